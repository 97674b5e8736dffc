import type { Router } from 'express';
import { signInApi } from '#shared/contracts/sign-in.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import { addressOf, limit } from '../../http/rate-limit.ts';
import { signedInUserId, signIn, signOut, signOutEverywhere } from '../../http/sign-in.ts';
import { isFromThisMachine } from '../../http/this-machine.ts';
import { checkCredentials, whoIs } from './sign-in.service.ts';

const done = { ok: true } as const;
const quarterHourMs = 15 * 60_000;
const emailOf = (body: unknown) =>
  typeof body === 'object' && body !== null && 'email' in body ? String(body.email).toLowerCase().slice(0, 200) : '';

export function signInRoutes(router: Router, access: Access, deps: Deps): void {
  const perAddress = limit({ attempts: 50, windowMs: quarterHourMs, failuresOnly: true });
  const perAccount = limit({
    attempts: 10,
    windowMs: quarterHourMs,
    failuresOnly: true,
    by: (request) => `${addressOf(request)} ${emailOf(request.body)}`,
  });

  mount(router, access, signInApi.me, async ({ request }) =>
    whoIs(deps, signedInUserId(request), isFromThisMachine(request)),
  );
  mount(
    router,
    access,
    signInApi.signIn,
    async ({ body, request }) => {
      const person = await checkCredentials(deps, body);
      await signIn(request, person.id);
      return person;
    },
    perAddress,
    perAccount,
  );
  mount(router, access, signInApi.signOut, async ({ request }) => {
    await signOut(request);
    return done;
  });
  mount(router, access, signInApi.signOutEverywhere, async ({ request }, who) => {
    await signOutEverywhere(deps.db, request, who.userId);
    return done;
  });
}
