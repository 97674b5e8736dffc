import type { Router } from 'express';
import { signInApi } from '#shared/contracts/sign-in.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import type { OpenConsoles } from '../../http/open-consoles.ts';
import { addressOf, emailOf, limit } from '../../http/rate-limit.ts';
import { originOf, placeIdOf, signedInUserId, signIn, signOut, signOutEverywhere } from '../../http/sign-in.ts';
import { isFromThisMachine } from '../../http/this-machine.ts';
import { mayReadMailbox } from '../mail/mailbox-access.ts';
import { checkCredentials, whoIs } from './sign-in.service.ts';

const done = { ok: true } as const;
const quarterHourMs = 15 * 60_000;
export function signInRoutes(router: Router, access: Access, deps: Deps, consoles: OpenConsoles): void {
  const perAddress = limit({ attempts: 50, windowMs: quarterHourMs, failuresOnly: true });
  const perAccount = limit({
    attempts: 10,
    windowMs: quarterHourMs,
    failuresOnly: true,
    by: (request) => `${addressOf(request)} ${emailOf(request.body)}`,
  });

  mount(router, access, signInApi.me, async ({ request }) =>
    whoIs(deps, signedInUserId(request), {
      onThisMachine: isFromThisMachine(request),
      mailbox: mayReadMailbox(deps.config, request),
    }),
  );
  mount(
    router,
    access,
    signInApi.signIn,
    async ({ body, request }) => {
      const person = await checkCredentials(deps, body, originOf(request));
      await signIn(request, person.id, deps.clock.now());
      return person;
    },
    perAddress,
    perAccount,
  );
  mount(router, access, signInApi.signOut, async ({ request }) => {
    const placeId = placeIdOf(request);
    await signOut(request);
    consoles.end((open) => open.placeId === placeId);
    return done;
  });
  mount(router, access, signInApi.signOutEverywhere, async ({ request }, who) => {
    await signOutEverywhere(deps.db, request, who.userId);
    consoles.end(({ userId }) => userId === who.userId);
    return done;
  });
}
