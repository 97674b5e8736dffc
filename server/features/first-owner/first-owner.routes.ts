import type { Router } from 'express';
import { linksApi } from '#shared/contracts/links.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import { limit } from '../../http/rate-limit.ts';
import { signIn } from '../../http/sign-in.ts';
import { signedInPersonById } from '../sign-in/sign-in.service.ts';
import type { FirstOwner } from './first-owner.service.ts';

export function firstOwnerRoutes(router: Router, access: Access, deps: Deps, firstOwner: FirstOwner): void {
  const guesses = limit({ attempts: 30, windowMs: 15 * 60_000, failuresOnly: true });
  mount(
    router,
    access,
    linksApi.createFirstOwner,
    async ({ body, request }) => {
      const userId = await firstOwner.create(body);
      await signIn(request, userId, deps.clock.now());
      return signedInPersonById(deps, userId);
    },
    guesses,
  );
}
