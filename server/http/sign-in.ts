import { createHash } from 'node:crypto';
import type { IncomingMessage } from 'node:http';
import { TLSSocket } from 'node:tls';
import type { Request, RequestHandler } from 'express';
import session, { type SessionData } from 'express-session';
import { type DataSource, LessThan } from 'typeorm';
import type { Config } from '../config.ts';
import { WebSession } from '../features/sign-in/web-session.entity.ts';

// The one file that reads or writes the web framework's session. People sign in; only rooms have sessions.

declare module 'express-session' {
  interface SessionData {
    userId?: string;
  }
}

const lifetimeMs = 14 * 24 * 60 * 60 * 1000;
const digestOf = (sid: string) => createHash('sha256').update(sid).digest('hex');

/** express-session's store over a TypeORM entity. */
class DatabaseStore extends session.Store {
  readonly #db: DataSource;
  readonly #now: () => number;

  constructor(db: DataSource, now: () => number) {
    super();
    this.#db = db;
    this.#now = now;
  }

  override get(sid: string, callback: (error: unknown, data?: SessionData | null) => void): void {
    this.#read(sid).then(
      (data) => callback(null, data),
      (error) => callback(error),
    );
  }

  override set(sid: string, data: SessionData, callback?: (error?: unknown) => void): void {
    const expires = data.cookie.expires ?? new Date(this.#now() + lifetimeMs);
    this.#db.manager
      .upsert(
        WebSession,
        {
          idDigest: digestOf(sid),
          userId: data.userId ?? null,
          data: JSON.stringify(data),
          expiresAt: new Date(expires),
        },
        ['idDigest'],
      )
      .then(
        () => callback?.(),
        (error) => callback?.(error),
      );
  }

  override destroy(sid: string, callback?: (error?: unknown) => void): void {
    this.#db.manager.delete(WebSession, { idDigest: digestOf(sid) }).then(
      () => callback?.(),
      (error) => callback?.(error),
    );
  }

  override touch(sid: string, data: SessionData, callback?: (error?: unknown) => void): void {
    this.set(sid, data, callback);
  }

  async #read(sid: string): Promise<SessionData | null> {
    const row = await this.#db.manager.findOneBy(WebSession, { idDigest: digestOf(sid) });
    if (row === null || row.expiresAt.getTime() <= this.#now()) return null;
    return JSON.parse(row.data) as SessionData;
  }
}

/** Whether a request came over TLS, to this server or to the proxy that it trusts. */
function isSecure(request: IncomingMessage, config: Config): boolean {
  if (request.socket instanceof TLSSocket) return true;
  const [protocol] = String(request.headers['x-forwarded-proto'] ?? '').split(',');
  return config.trustProxy && protocol?.trim() === 'https';
}

/**
 * Keeps people signed in: a cookie that scripts cannot read, and a row in MariaDB. Under TLS the cookie has a name of
 * its own, because cookies do not tell ports apart: a browser that holds a secure one refuses a plain one of that name.
 */
export function signInMiddleware(db: DataSource, config: Config, now: () => number): RequestHandler {
  const withCookie = (name: string, secure: boolean) =>
    session({
      name,
      secret: config.sessionSecret,
      // One each: express-session writes into its store how a cookie is made.
      store: new DatabaseStore(db, now),
      resave: false,
      saveUninitialized: false,
      rolling: false,
      proxy: config.trustProxy,
      cookie: { httpOnly: true, sameSite: 'lax', secure, path: '/', maxAge: lifetimeMs },
    });
  const plain = withCookie('fairlead', false);
  const secure = withCookie('__Host-fairlead', true);
  return (request, response, next) => (isSecure(request, config) ? secure : plain)(request, response, next);
}

export function signedInUserId(request: { session?: Partial<SessionData> }): string | null {
  return request.session?.userId ?? null;
}

const asPromise = (run: (done: (error?: unknown) => void) => void) =>
  new Promise<void>((resolve, reject) => run((error) => (error ? reject(error) : resolve())));

/** Signs a person in under a fresh session id. */
export async function signIn(request: Request, userId: string): Promise<void> {
  await asPromise((done) => request.session.regenerate(done));
  request.session.userId = userId;
  await asPromise((done) => request.session.save(done));
}

export async function signOut(request: Request): Promise<void> {
  await asPromise((done) => request.session.destroy(done));
}

/** Ends every signed-in browser of a person, this one included. */
export async function signOutEverywhere(db: DataSource, request: Request, userId: string): Promise<void> {
  await signOut(request);
  await db.manager.delete(WebSession, { userId });
}

/** Removes what has expired. */
export async function forgetExpired(db: DataSource, now: number): Promise<void> {
  await db.manager.delete(WebSession, { expiresAt: LessThan(new Date(now)) });
}
