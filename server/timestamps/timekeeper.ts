import { withTransaction } from '../db/transaction.ts';
import type { Deps } from '../deps.ts';
import { signatureOf } from '../ledger/head-signatures.ts';
import type { TimestampAuthority } from './authority.ts';
import { fetchToken } from './fetch-token.ts';
import type { TokenRequest } from './token-request.entity.ts';
import { lockDueRequest, storeToken, updateRequest } from './tokens.store.ts';

const secondMs = 1000;
const minuteMs = 60 * secondMs;
const hourMs = 60 * minuteMs;
const lookEveryMs = secondMs;

/** How long after each failed attempt the next one comes; after the last delay it stays at that, and never ends. */
export const tokenDelaysMs = [
  30 * secondMs,
  2 * minuteMs,
  10 * minuteMs,
  30 * minuteMs,
  2 * hourMs,
  6 * hourMs,
] as const;
const longestDelayMs = tokenDelaysMs[tokenDelaysMs.length - 1] ?? hourMs;

/** Longer than an attempt can take; a head whose server was killed in the middle is due again after it. */
const leaseMs = 2 * minuteMs;

const wordsOf = (error: unknown) => (error instanceof Error ? error.message : String(error)).slice(0, 500);

/** Fetches the tokens that signed heads wait for, one after the other, until it is stopped. Nothing waits for it. */
export class Timekeeper {
  readonly #deps: Deps;
  readonly #authority: TimestampAuthority;
  #cancel: () => void = () => {};
  #round: Promise<void> = Promise.resolve();
  #stopped = false;

  constructor(deps: Deps, authority: TimestampAuthority) {
    this.#deps = deps;
    this.#authority = authority;
  }

  start(): void {
    this.#next();
  }

  /** Lets the attempt that is under way end. */
  async stop(): Promise<void> {
    this.#stopped = true;
    this.#cancel();
    await this.#round;
  }

  #next(): void {
    if (this.#stopped) return;
    const { clock, log } = this.#deps;
    this.#cancel = clock.at(clock.now() + lookEveryMs, () => {
      this.#round = this.#fetchDue()
        .catch((error) => log.error({ err: error }, 'the heads that wait for a token could not be read'))
        .then(() => this.#next());
    });
  }

  /** Ends with the first failure: a service that is down would take its time over each. */
  async #fetchDue(): Promise<void> {
    for (;;) {
      const request = this.#stopped ? null : await this.#take();
      if (request === null || !(await this.#fetch(request))) return;
    }
  }

  #take(): Promise<TokenRequest | null> {
    const { db, clock } = this.#deps;
    return withTransaction(db, async (tx) => {
      const now = clock.now();
      const request = await lockDueRequest(tx, new Date(now));
      if (request === null) return null;
      const attempts = request.attempts + 1;
      await updateRequest(tx, request, { attempts, nextAttemptAt: new Date(now + leaseMs) });
      return { ...request, attempts };
    });
  }

  async #fetch(request: TokenRequest): Promise<boolean> {
    const { db, clock, random, log } = this.#deps;
    const { studyId, sequence, attempts } = request;
    try {
      const signature = await signatureOf(db.manager, studyId, sequence);
      const token = await fetchToken(this.#authority, signature, random.bytes('token-nonce', 8).toString('hex'));
      await withTransaction(db, (tx) => storeToken(tx, { ...token, attempts, receivedAt: new Date(clock.now()) }));
      return true;
    } catch (error) {
      const lastError = wordsOf(error);
      log.warn({ study: studyId, sequence, attempts, reason: lastError }, 'a token could not be fetched');
      const delayMs = tokenDelaysMs[attempts - 1] ?? longestDelayMs;
      await updateRequest(db.manager, request, { lastError, nextAttemptAt: new Date(clock.now() + delayMs) });
      return false;
    }
  }
}
