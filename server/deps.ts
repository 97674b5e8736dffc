import type { Logger } from 'pino';
import type { DataSource } from 'typeorm';
import type { Config } from './config.ts';
import type { FileStore } from './files/file-store.ts';
import type { TimestampAuthority } from './timestamps/authority.ts';

/** What randomness is for. Production draws all of it from the operating system; tests give each purpose a source of its own. */
export type RandomPurpose =
  | 'id'
  | 'entry-nonce'
  | 'protocol-salt'
  | 'code-key'
  | 'code-key-salt'
  | 'draw-secret'
  | 'draw-salt'
  | 'seat-token'
  | 'session-code'
  | 'publication-id'
  | 'password-salt'
  | 'link-token'
  | 'signing-key'
  | 'signing-key-iv'
  | 'token-nonce';

export type Random = {
  bytes(purpose: RandomPurpose, count: number): Buffer;
  id(): string;
};

/** Milliseconds since 1970, and a call at a later time. Tests give one that they move by hand. */
export type Clock = {
  now(): number;
  /** Calls back once at or after `atMs`; returns what cancels it. */
  at(atMs: number, callback: () => void): () => void;
};

/** Everything that the application is given from outside. */
export type Deps = {
  readonly config: Config;
  readonly db: DataSource;
  readonly clock: Clock;
  readonly random: Random;
  /** Who stamps the time on signed heads; null leaves them waiting. */
  readonly timestamps: TimestampAuthority | null;
  /** Where uploaded files are kept. */
  readonly files: FileStore;
  readonly log: Logger;
};
