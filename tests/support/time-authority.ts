import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { buffer } from 'node:stream/consumers';
import { timestampRequest } from '#shared/ledger/timestamp-token.ts';

/** What a faulty authority does instead of its duty. */
export type TimeFault =
  | 'error page'
  | 'garbage'
  | 'cut short'
  | 'wrong imprint'
  | 'wrong nonce'
  | 'forged signature'
  | 'refused'
  | 'no certificate'
  | 'endless';

const settings = `[ req ]
distinguished_name = name
[ name ]
commonName = Name
[ root ]
basicConstraints = critical, CA:TRUE
keyUsage = critical, keyCertSign, cRLSign
[ stamp ]
basicConstraints = critical, CA:FALSE
keyUsage = critical, digitalSignature
extendedKeyUsage = critical, timeStamping
[ ca ]
database = ./index.txt
serial = ./ca-serial
new_certs_dir = .
default_md = sha256
policy = any
email_in_dn = no
rand_serial = no
[ any ]
commonName = supplied
[ authority ]
serial = ./serial
signer_cert = ./stamp.pem
certs = ./root.pem
signer_key = ./stamp.key
signer_digest = sha256
default_policy = 2.25.1
digests = sha256
clock_precision_digits = 3
`;

const stampOf = (ms: number) => `${new Date(ms).toISOString().replace(/[-:T]|\.\d+/g, '')}`;

/** A real timestamp authority over HTTP on the loopback, made with openssl; it can be told to fail in many ways. */
export class TimeAuthority {
  readonly folder: string;
  fault: TimeFault | null = null;
  asked = 0;
  #server: Server;

  private constructor(folder: string, server: Server) {
    this.folder = folder;
    this.#server = server;
  }

  /** @param lifeMs how long its certificate is good from now on */
  static async open(lifeMs = 3_600_000): Promise<TimeAuthority> {
    const folder = mkdtempSync(join(tmpdir(), 'fairlead-authority-'));
    const authority: TimeAuthority = new TimeAuthority(
      folder,
      createServer(async (request, response) => {
        authority.asked += 1;
        const body = new Uint8Array(await buffer(request));
        const isQuestion =
          request.method === 'POST' && request.headers['content-type'] === 'application/timestamp-query';
        if (!isQuestion || authority.fault === 'error page') {
          response.writeHead(503, { 'content-type': 'text/html' }).end('<h1>Later</h1>');
          return;
        }
        response.writeHead(200, { 'content-type': 'application/timestamp-reply' });
        if (authority.fault === 'endless') {
          for (let count = 0; count < 300; count += 1) response.write(Buffer.alloc(1000));
          response.end();
        } else response.end(authority.#answer(body));
      }),
    );
    authority.#make(lifeMs);
    await authority.listen();
    return authority;
  }

  get port(): number {
    return (this.#server.address() as AddressInfo).port;
  }
  get url(): string {
    return `http://127.0.0.1:${this.port}/tsr`;
  }
  get root(): string {
    return readFileSync(join(this.folder, 'root.pem'), 'utf8');
  }

  listen(port = 0): Promise<void> {
    return new Promise((done) => this.#server.listen(port, '127.0.0.1', done));
  }

  /** Stops answering: whoever asks finds nobody there. */
  down(): Promise<void> {
    this.#server.closeAllConnections();
    return new Promise((done) => this.#server.close(() => done()));
  }

  async close(): Promise<void> {
    if (this.#server.listening) await this.down();
    rmSync(this.folder, { recursive: true });
  }

  openssl(...args: string[]): string {
    return execFileSync('openssl', args, { cwd: this.folder, stdio: 'pipe' }).toString();
  }

  #make(lifeMs: number): void {
    const write = (name: string, text: string) => writeFileSync(join(this.folder, name), text);
    write('settings', settings);
    write('serial', '01\n');
    write('ca-serial', '01\n');
    write('index.txt', '');
    const key = ['-newkey', 'ec', '-pkeyopt', 'ec_paramgen_curve:prime256v1', '-noenc', '-config', 'settings'];
    this.openssl(
      'req',
      '-x509',
      ...key,
      '-extensions',
      'root',
      '-subj',
      '/CN=Harbour time root',
      '-keyout',
      'root.key',
      '-out',
      'root.pem',
    );
    this.openssl('req', '-new', ...key, '-subj', '/CN=Harbour time', '-keyout', 'stamp.key', '-out', 'stamp.csr');
    const life = ['-startdate', stampOf(Date.now() - 60_000), '-enddate', stampOf(Date.now() + lifeMs)];
    const signer = [
      '-config',
      'settings',
      '-name',
      'ca',
      '-cert',
      'root.pem',
      '-keyfile',
      'root.key',
      '-extensions',
      'stamp',
    ];
    this.openssl('ca', '-batch', '-notext', ...signer, ...life, '-in', 'stamp.csr', '-out', 'stamp.pem');
  }

  #reply(request: Uint8Array): Buffer {
    writeFileSync(join(this.folder, 'request.tsq'), request);
    const made = ['-config', 'settings', '-section', 'authority', '-queryfile', 'request.tsq', '-out', 'reply.tsr'];
    this.openssl('ts', '-reply', ...made);
    return readFileSync(join(this.folder, 'reply.tsr'));
  }

  #answer(request: Uint8Array): Buffer {
    const hex = Buffer.from(request).toString('hex');
    // The request is fixed in shape: the digest stands after its tag and length, the nonce at the end before `cert`.
    const imprint = hex.match(/0420([0-9a-f]{64})/)?.[1] ?? '';
    const nonce = hex.match(/0420[0-9a-f]{64}02..([0-9a-f]+)0101ff$/)?.[1] ?? '';
    switch (this.fault) {
      case 'garbage':
        return Buffer.from('this is no reply');
      case 'cut short':
        return this.#reply(request).subarray(0, 200);
      case 'wrong imprint':
        return this.#reply(timestampRequest('0'.repeat(64), nonce));
      case 'wrong nonce':
        return this.#reply(timestampRequest(imprint, `${nonce}01`));
      case 'refused':
        // Status 2 with words, and no token (RFC 3161, 2.4.2).
        return Buffer.from('300c300a02010230050c034e6f2e', 'hex');
      case 'no certificate':
        return this.#reply(
          Buffer.from(
            `${hex.slice(0, 2)}${(request.length - 5).toString(16).padStart(2, '0')}${hex.slice(4, -6)}`,
            'hex',
          ),
        );
      case 'forged signature': {
        const reply = Buffer.from(this.#reply(request));
        reply.writeUInt8(reply.readUInt8(reply.length - 1) ^ 1, reply.length - 1);
        return reply;
      }
      default:
        return this.#reply(request);
    }
  }
}
