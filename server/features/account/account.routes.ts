import type { Router } from 'express';
import { accountApi } from '#shared/contracts/account.ts';
import { linksApi } from '#shared/contracts/links.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import type { OpenConsoles } from '../../http/open-consoles.ts';
import { addressOf, emailOf, limit } from '../../http/rate-limit.ts';
import { placeIdOf } from '../../http/sign-in.ts';
import * as account from './account.service.ts';
import * as resets from './password-resets.service.ts';

const hourMs = 60 * 60_000;

export function accountRoutes(router: Router, access: Access, deps: Deps, consoles: OpenConsoles): void {
  mount(router, access, accountApi.places, async ({ request }, { userId }) =>
    account.listPlaces(deps, { userId, placeId: placeIdOf(request) }),
  );
  mount(router, access, accountApi.endPlace, async ({ params }, { userId }) =>
    account.endPlace(deps, consoles, userId, params.id),
  );
  mount(router, access, accountApi.endOtherPlaces, async ({ request }, { userId }) =>
    account.endOtherPlaces(deps, consoles, { userId, placeId: placeIdOf(request) }),
  );
  mount(router, access, accountApi.attempts, async ({ query }, { userId }) =>
    account.listAttempts(deps, userId, query.page),
  );

  // By whom the mail is for as well, so that nobody's mailbox is filled from many places.
  const asked = limit({ attempts: 30, windowMs: hourMs });
  const askedFor = limit({
    attempts: 5,
    windowMs: hourMs,
    by: (request) => emailOf(request.body) || addressOf(request),
  });
  const guesses = limit({ attempts: 30, windowMs: hourMs / 4, failuresOnly: true });
  mount(
    router,
    access,
    linksApi.askForReset,
    async ({ body }) => resets.askForReset(deps, body.email),
    asked,
    askedFor,
  );
  mount(router, access, linksApi.lookAtReset, async ({ body }) => resets.lookAtReset(deps, body.token), guesses);
  mount(
    router,
    access,
    linksApi.resetPassword,
    async ({ body }) => resets.resetPassword(deps, consoles, body),
    guesses,
  );
}
