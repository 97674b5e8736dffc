import type { Server as HttpServer } from 'node:http';
import type { RequestHandler } from 'express';
import { Server, type Socket } from 'socket.io';
import { z } from 'zod';
import { listenerCommand } from '#shared/contracts/listener-live.ts';
import type { Acknowledgement, ClientToServer, ServerToClient } from '#shared/contracts/live.ts';
import { observerCommand } from '#shared/contracts/observer-live.ts';
import { proctorCommand } from '#shared/contracts/proctor-live.ts';
import { Problem } from '#shared/problem.ts';
import type { Deps } from '../deps.ts';
import type { Observer } from '../features/observers/observer.entity.ts';
import { dutiesOf, observerByToken } from '../features/observers/observers.service.ts';
import { tokenDigest } from '../features/sessions/seats.service.ts';
import { seatByToken } from '../features/sessions/sessions.store.ts';
import { problemFrom } from '../http/problem-handler.ts';
import { signedInUserId } from '../http/sign-in.ts';
import type { Sittings } from './sittings.ts';

const liveAuth = z.discriminatedUnion('audience', [
  z.strictObject({ audience: z.literal('listener'), token: z.string().min(1).max(100) }),
  z.strictObject({ audience: z.literal('proctor'), sessionId: z.uuid() }),
  z.strictObject({ audience: z.literal('observer'), token: z.string().min(1).max(100) }),
]);

/** Whom a socket belongs to, once that is known: a seat, or the console of a session. */
type Place =
  | { audience: 'listener'; sessionId: string; seat: string }
  | { audience: 'proctor'; sessionId: string }
  | { audience: 'observer'; sessionId: string; observer: Observer };
type LiveSocket = Socket<ClientToServer, ServerToClient, Record<string, never>, { place: Place }>;

async function placeOf(deps: Deps, sittings: Sittings, socket: LiveSocket): Promise<Place> {
  const auth = liveAuth.safeParse(socket.handshake.auth);
  if (!auth.success) throw new Problem('not-found', 'This link leads to no session.');
  if (auth.data.audience === 'listener') {
    const digest = tokenDigest(auth.data.token);
    const rehearsed = sittings.rehearsals.bySeat(digest);
    if (rehearsed !== null)
      return { audience: 'listener', sessionId: rehearsed.sitting.memory.session.id, seat: rehearsed.seat };
    const seat = await seatByToken(deps.db.manager, digest);
    if (seat === null) throw new Problem('not-found', 'This seat is not known. Take a seat with the session’s code.');
    return { audience: 'listener', sessionId: seat.sessionId, seat: seat.label };
  }
  if (auth.data.audience === 'observer') {
    const observer = await observerByToken(deps.db.manager, deps, auth.data.token);
    return { audience: 'observer', sessionId: observer.sessionId, observer };
  }
  const userId = signedInUserId(socket.request as Parameters<typeof signedInUserId>[0]);
  if (userId === null) throw new Problem('not-signed-in', 'Sign in to run this session.');
  const sitting = await sittings.of(auth.data.sessionId);
  if (sitting.memory.session.proctorId !== userId) throw new Problem('not-found', 'There is no such session.');
  return { audience: 'proctor', sessionId: auth.data.sessionId };
}

function parse<S extends z.ZodType>(schema: S, value: unknown): z.output<S> {
  const parsed = schema.safeParse(value);
  if (parsed.success) return parsed.data;
  const faults = parsed.error.issues.map(({ path, message }) => ({
    pointer: path.map((part) => `/${String(part)}`).join(''),
    detail: message,
  }));
  throw new Problem('invalid-input', 'This could not be understood.', faults);
}

async function perform(deps: Deps, sittings: Sittings, place: Place, value: unknown): Promise<Acknowledgement> {
  const sitting = await sittings.of(place.sessionId);
  if (place.audience === 'proctor') {
    await sitting.command(parse(proctorCommand, value));
    return { ok: true };
  }
  if (place.audience === 'observer') {
    const { observer } = place;
    await sitting.signedBy(observer, parse(observerCommand, value), await dutiesOf(deps, observer));
    return { ok: true };
  }
  const command = parse(listenerCommand as unknown as z.ZodType<z.output<typeof listenerCommand>>, value);
  if (command.kind === 'answer') return { ok: true, held: await sitting.answer(place.seat, command) };
  if (command.kind === 'request-presentation') {
    await sitting.request(place.seat, command);
    return { ok: true };
  }
  await sitting.fromPhone(place.seat, command);
  return { ok: true };
}

/** Serves the live sockets: listeners by their seat's token, a proctor by the signed-in cookie. */
export function serveSockets(http: HttpServer, deps: Deps, sittings: Sittings, signInMiddleware: RequestHandler) {
  const io = new Server<ClientToServer, ServerToClient, Record<string, never>, { place: Place }>(http, {
    serveClient: false,
    maxHttpBufferSize: 16_384,
    pingInterval: 10_000,
    pingTimeout: 8_000,
  });
  io.engine.use(signInMiddleware);
  io.use((socket, next) => {
    placeOf(deps, sittings, socket).then(
      (place) => {
        socket.data.place = place;
        next();
      },
      (error) => next(Object.assign(new Error('refused'), { data: problemFrom(error, deps.log).toBody() })),
    );
  });
  io.on('connection', (socket) => {
    const { place } = socket.data;
    const sitting = sittings.of(place.sessionId);
    sitting.then(
      (found) => {
        const disconnect =
          place.audience === 'listener'
            ? found.connectPhone(place.seat, (view) => socket.emit('view', view))
            : place.audience === 'observer'
              ? found.connectObserver(place.observer, (view) => socket.emit('view', view))
              : found.connectConsole((view) => socket.emit('view', view));
        if (socket.connected) socket.on('disconnect', disconnect);
        else disconnect();
      },
      (error) => socket.emit('closed', problemFrom(error, deps.log).toBody()),
    );
    socket.on('command', (value, acknowledge) => {
      if (typeof acknowledge !== 'function') return;
      perform(deps, sittings, place, value).then(acknowledge, (error) =>
        acknowledge({ ok: false, problem: problemFrom(error, deps.log).toBody() }),
      );
    });
  });
  return io;
}
