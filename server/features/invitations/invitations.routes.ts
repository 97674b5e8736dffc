import type { Router } from 'express';
import { linksApi } from '#shared/contracts/links.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import { limit } from '../../http/rate-limit.ts';
import { signIn } from '../../http/sign-in.ts';
import * as accepting from './accepting.service.ts';

export function invitationsRoutes(router: Router, access: Access, deps: Deps): void {
  const guesses = limit({ attempts: 60, windowMs: 15 * 60_000, failuresOnly: true });
  mount(
    router,
    access,
    linksApi.lookAtInvitation,
    async ({ body }) => accepting.lookAtInvitation(deps, body.token),
    guesses,
  );
  mount(
    router,
    access,
    linksApi.acceptInvitation,
    async ({ body, request }) => {
      const { userId, organisationId } = await accepting.acceptInvitation(deps, body);
      await signIn(request, userId, deps.clock.now());
      return { organisationId };
    },
    guesses,
  );
  mount(
    router,
    access,
    linksApi.joinByInvitation,
    async ({ body }, who) => accepting.joinByInvitation(deps, who.userId, body.token),
    guesses,
  );
}
