import { createHash } from 'node:crypto';
import type { IncomingMessage } from 'node:http';
import { TLSSocket } from 'node:tls';
import type { Request, RequestHandler } from 'express';
import session, { type SessionData } from 'express-session';
import { type DataSource, LessThan, Not } from 'typeorm';
import type { Config } from '../config.ts';
import type { Tx } from '../db/transaction.ts';
import { WebSession } from '../features/sign-in/web-session.entity.ts';

// The one file that reads or writes the web framework's session. People sign in; only rooms have sessions.

declare module 'express-session' {
  interface SessionData {
    userId?: string;
    place?: { address: string; browser: string; signedInAt: number };
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
    this.#db.manager
      .upsert(
        WebSession,
        {
          idDigest: digestOf(sid),
          userId: data.userId ?? null,
          address: data.place?.address ?? '',
          browser: data.place?.browser ?? '',
          signedInAt: new Date(data.place?.signedInAt ?? this.#now()),
          ...this.#seen(data),
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
    // Never an upsert: a request that was under way when its sign-in ended must not bring it back.
    this.#db.manager.update(WebSession, { idDigest: digestOf(sid) }, this.#seen(data)).then(
      () => callback?.(),
      (error) => callback?.(error),
    );
  }

  #seen(data: SessionData) {
    const now = this.#now();
    const expiresAt = new Date(data.cookie.expires ?? now + lifetimeMs);
    return { data: JSON.stringify(data), expiresAt, lastSeenAt: new Date(now) };
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

/** The network address and the browser that a request comes from, for its person to see later. */
export function originOf(request: Request): { address: string; browser: string } {
  return { address: (request.ip ?? '').slice(0, 45), browser: (request.headers['user-agent'] ?? '').slice(0, 200) };
}

/** Names a signed-in browser to its person; from it the cookie cannot be made. */
export function placeIdOf(request: { sessionID?: string }): string {
  return digestOf(request.sessionID ?? '');
}

/** Signs a person in under a fresh session id. */
export async function signIn(request: Request, userId: string, now: number): Promise<void> {
  await asPromise((done) => request.session.regenerate(done));
  request.session.userId = userId;
  request.session.place = { ...originOf(request), signedInAt: now };
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

/** Where a person is signed in, last seen first. */
export function placesOf(db: Pick<DataSource, 'manager'>, userId: string): Promise<WebSession[]> {
  return db.manager.find(WebSession, { where: { userId }, order: { lastSeenAt: 'DESC' } });
}

/** Ends one signed-in browser of a person; says whether there was one. */
export async function endPlace(db: DataSource, userId: string, placeId: string): Promise<boolean> {
  const { affected } = await db.manager.delete(WebSession, { userId, idDigest: placeId });
  return affected === 1;
}

export async function endOtherPlaces(db: DataSource, userId: string, placeId: string): Promise<void> {
  await db.manager.delete(WebSession, { userId, idDigest: Not(placeId) });
}

/** Ends every signed-in browser of a person, in the transaction of what makes it necessary. */
export async function endAllPlaces(tx: Tx, userId: string): Promise<void> {
  await tx.delete(WebSession, { userId });
}

/** Removes what has expired. */
export async function forgetExpired(db: DataSource, now: number): Promise<void> {
  await db.manager.delete(WebSession, { expiresAt: LessThan(new Date(now)) });
}
