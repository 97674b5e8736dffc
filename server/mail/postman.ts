import { createTransport } from 'nodemailer';
import { withTransaction } from '../db/transaction.ts';
import type { Deps } from '../deps.ts';
import { eraseTexts, lockDue, textErased, updateMail } from './outbox.store.ts';
import type { OutgoingMail } from './outgoing-mail.entity.ts';

const secondMs = 1000;
const minuteMs = 60 * secondMs;
const hourMs = 60 * minuteMs;
const lookEveryMs = secondMs;
const atOnce = 10;
const keepTextMs = 7 * 24 * hourMs;

/** How long after each failed attempt the next one comes; after the last the mail is given up. */
export const retryDelaysMs = [
  30 * secondMs,
  2 * minuteMs,
  10 * minuteMs,
  30 * minuteMs,
  2 * hourMs,
  6 * hourMs,
  12 * hourMs,
] as const;

/** Longer than an attempt can take; a mail whose server was killed in the middle is due again after it. */
const leaseMs = 2 * minuteMs;

/** The receiving server knows this address and refuses it for good (RFC 5321, 4.2.1: a reply of 5yz). */
function isRefusedForGood(error: unknown): boolean {
  const { code, responseCode } = error as { code?: unknown; responseCode?: unknown };
  return code === 'EENVELOPE' && typeof responseCode === 'number' && responseCode >= 500;
}

const wordsOf = (error: unknown) => (error instanceof Error ? error.message : String(error)).slice(0, 500);

/** Sends what lies in the outbox, until it is stopped. At least once: the Message-ID tells a repeat. */
export class Postman {
  readonly #deps: Deps;
  readonly #from: string;
  readonly #transport: ReturnType<typeof createTransport>;
  #cancel: () => void = () => {};
  #round: Promise<void> = Promise.resolve();
  #stopped = false;

  constructor(deps: Deps, smtp: { url: string; from: string }) {
    this.#deps = deps;
    this.#from = smtp.from;
    this.#transport = createTransport({
      url: smtp.url,
      connectionTimeout: 15 * secondMs,
      greetingTimeout: 15 * secondMs,
      socketTimeout: 30 * secondMs,
    });
  }

  start(): void {
    this.#next();
  }

  /** Lets the round that is under way end. */
  async stop(): Promise<void> {
    this.#stopped = true;
    this.#cancel();
    await this.#round;
    this.#transport.close();
  }

  #next(): void {
    if (this.#stopped) return;
    this.#cancel = this.#deps.clock.at(this.#deps.clock.now() + lookEveryMs, () => {
      this.#round = this.#sendDue()
        .catch((error) => this.#deps.log.error({ err: error }, 'the outbox could not be read'))
        .then(() => this.#next());
    });
  }

  async #sendDue(): Promise<void> {
    const mails = await this.#take();
    await Promise.all(mails.map((mail) => this.#send(mail)));
  }

  /** Counts the attempt before it is made, so that a server that dies of it does not try for ever. */
  #take(): Promise<OutgoingMail[]> {
    const { db, clock } = this.#deps;
    return withTransaction(db, async (tx) => {
      const now = clock.now();
      const due = await lockDue(tx, new Date(now), atOnce);
      for (const mail of due) {
        mail.attempts += 1;
        const nextAttemptAt = new Date(now + leaseMs);
        await updateMail(tx, mail.id, { attempts: mail.attempts, nextAttemptAt });
      }
      return due;
    });
  }

  async #send(mail: OutgoingMail): Promise<void> {
    const { db, clock, log, config } = this.#deps;
    const { id, recipient, subject, text, html, calendar, calendarMethod } = mail;
    try {
      await this.#transport.sendMail({
        from: this.#from,
        to: { name: '', address: recipient },
        subject,
        text,
        html,
        ...(calendar === null || calendarMethod === null
          ? {}
          : { icalEvent: { method: calendarMethod, filename: 'session.ics', content: calendar } }),
        messageId: `<${id}@${new URL(config.publicUrl).hostname}>`,
        headers: { 'Auto-Submitted': 'auto-generated' },
      });
    } catch (error) {
      log.warn({ mail: id, attempts: mail.attempts, reason: wordsOf(error) }, 'a mail could not be sent');
      await this.#postpone(mail, error);
      return;
    }
    const sentAt = new Date(clock.now());
    await updateMail(db.manager, id, { state: 'sent', sentAt, lastError: null, ...textErased });
  }

  async #postpone({ id, attempts }: OutgoingMail, error: unknown): Promise<void> {
    const { db, clock } = this.#deps;
    const delayMs = retryDelaysMs[attempts - 1];
    const lastError = wordsOf(error);
    if (delayMs === undefined || isRefusedForGood(error))
      await updateMail(db.manager, id, { state: 'failed', lastError });
    else await updateMail(db.manager, id, { nextAttemptAt: new Date(clock.now() + delayMs), lastError });
  }
}

/** Empties the texts of mails that were given up a week ago: their links have expired. */
export function forgetOldTexts({ db, clock }: Deps): Promise<void> {
  return eraseTexts(db.manager, new Date(clock.now() - keepTextMs), ['failed']);
}
