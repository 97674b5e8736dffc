import type { Server, Socket } from 'socket.io';
import { crew } from '#shared/contracts/endpoint.ts';
import { Problem } from '#shared/problem.ts';
import type { Deps } from '../deps.ts';
import { Membership } from '../features/organisations/membership.entity.ts';
import { problemFrom } from './problem-handler.ts';
import { placeIdOf, signedInUserId } from './sign-in.ts';

/** A console's socket: who opened it, in which signed-in browser, and of which organisation's session. */
export type OpenConsole = { readonly userId: string; readonly placeId: string; readonly organisationId: string };

type SignedInRequest = Parameters<typeof signedInUserId>[0] & Parameters<typeof placeIdOf>[0];

/**
 * The consoles that are open. A cookie and a membership are checked when a console connects; when either ends, the
 * console ends with it.
 */
export class OpenConsoles {
  readonly #deps: Deps;
  readonly #open = new Map<Pick<Socket, 'emit' | 'disconnect'>, OpenConsole>();

  constructor(deps: Deps) {
    this.#deps = deps;
  }

  /** `organisationOf` finds the organisation whose session or rehearsal it is. @throws Problem when there is none */
  // biome-ignore lint/suspicious/noExplicitAny: the events are the live server's business
  watch(io: Server<any, any, any, any>, organisationOf: (sessionId: string) => Promise<string>): void {
    io.use((socket, next) => {
      if (socket.handshake.auth.audience !== 'proctor') return next();
      this.#admit(socket, organisationOf).then(
        () => next(),
        (error) => {
          this.#open.delete(socket);
          next(Object.assign(new Error('refused'), { data: problemFrom(error, this.#deps.log).toBody() }));
        },
      );
    });
  }

  /** Registers first and checks then, so that no end falls between the two. */
  async #admit(socket: Socket, organisationOf: (sessionId: string) => Promise<string>): Promise<void> {
    const { manager } = this.#deps.db;
    const request = socket.request as unknown as SignedInRequest;
    const userId = signedInUserId(request);
    if (userId === null) throw new Problem('not-found', 'There is no such session.');
    const organisationId = await organisationOf(String(socket.handshake.auth.sessionId));
    this.#open.set(socket, { userId, placeId: placeIdOf(request), organisationId });
    socket.on('disconnect', () => this.#open.delete(socket));
    const membership = await manager.findOneBy(Membership, { organisationId, userId });
    const mayRun = membership !== null && (crew as readonly string[]).includes(membership.role);
    if (!mayRun) throw new Problem('not-found', 'There is no such session.');
  }

  end(which: (console: OpenConsole) => boolean): void {
    const problem = new Problem(
      'not-signed-in',
      'Your access to this console has ended. Its session is kept as it is.',
    );
    for (const [socket, open] of this.#open) {
      if (!which(open)) continue;
      socket.emit('closed', problem.toBody());
      socket.disconnect(true);
    }
  }
}
