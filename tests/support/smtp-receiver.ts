import { once } from 'node:events';
import type { AddressInfo } from 'node:net';
import PostalMime, { type Email } from 'postal-mime';
import { SMTPServer } from 'smtp-server';
import { until } from './until.ts';

type Refusal = { code: number; words: string };

/** A real SMTP server that keeps what it receives, and can refuse. */
export class SmtpReceiver {
  readonly mails: Email[] = [];
  /** What the next recipients are answered; null takes them. */
  refusal: Refusal | null = null;
  readonly url: string;
  readonly #server: SMTPServer;

  private constructor(server: SMTPServer, port: number) {
    this.#server = server;
    this.url = `smtp://127.0.0.1:${port}`;
  }

  static async open(port = 0): Promise<SmtpReceiver> {
    const server = new SMTPServer({
      authOptional: true,
      disabledCommands: ['STARTTLS', 'AUTH'],
      onRcptTo: (_address, _session, done) => {
        const { refusal } = receiver;
        done(refusal === null ? null : Object.assign(new Error(refusal.words), { responseCode: refusal.code }));
      },
      onData: (stream, _session, done) => {
        const chunks: Buffer[] = [];
        stream.on('data', (chunk: Buffer) => chunks.push(chunk));
        stream.on('end', () => {
          PostalMime.parse(Buffer.concat(chunks)).then((mail) => {
            receiver.mails.push(mail);
            done();
          }, done);
        });
      },
    });
    server.listen(port, '127.0.0.1');
    await once(server.server, 'listening');
    const receiver = new SmtpReceiver(server, (server.server.address() as AddressInfo).port);
    return receiver;
  }

  get port(): number {
    return Number(new URL(this.url).port);
  }

  /** Waits for a mail to somebody whose subject has these words. */
  to(recipient: string, words: string): Promise<Email> {
    return until(`a mail to ${recipient} about ${words}`, () =>
      this.mails.find(({ to, subject }) => to?.[0]?.address === recipient && subject?.includes(words)),
    );
  }

  async close(): Promise<void> {
    await new Promise<void>((resolve) => this.#server.close(() => resolve()));
  }
}

export const smtpEnvironment = (receiver: { url: string }) => ({
  SMTP_URL: receiver.url,
  MAIL_FROM: 'Fairlead <fairlead@fairlead.test>',
});
