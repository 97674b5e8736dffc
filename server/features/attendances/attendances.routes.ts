import type { Router } from 'express';
import { attendancesApi } from '#shared/contracts/attendances.ts';
import { personalLinkApi } from '#shared/contracts/personal-link.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import { addressOf, limit } from '../../http/rate-limit.ts';
import type { Sittings } from '../../live/sittings.ts';
import * as answering from './answering.service.ts';
import * as inviting from './inviting.service.ts';
import { erase } from './listeners.service.ts';

const tenMinutesMs = 10 * 60_000;

export function attendancesRoutes(router: Router, access: Access, deps: Deps, sittings: Sittings): void {
  mount(router, access, attendancesApi.list, async ({ params, query }, who) =>
    inviting.listAttendances(deps, who, params.id, query),
  );
  mount(router, access, attendancesApi.invite, async ({ params, body }, who) =>
    inviting.inviteListeners(deps, who, params.id, body),
  );
  mount(router, access, attendancesApi.sendAgain, async ({ params }) => inviting.sendAgain(deps, params));
  mount(router, access, attendancesApi.withdraw, async ({ params }) => inviting.withdraw(deps, params));
  mount(router, access, attendancesApi.erase, async ({ params }) => erase(deps, params));

  const { look, answer, calendar, takeSeat, erase: eraseOwn } = personalLinkApi;
  const guesses = limit({ attempts: 120, windowMs: tenMinutesMs, failuresOnly: true });
  // Every change of mind writes mail, to others too.
  const changesOfMind = limit({
    attempts: 12,
    windowMs: tenMinutesMs,
    by: (request) => (isLink(request.body?.token) ? request.body.token : addressOf(request)),
    failuresOnly: false,
  });
  mount(router, access, look, async ({ body }) => answering.lookAtInvitation(deps, body.token), guesses);
  mount(
    router,
    access,
    answer,
    async ({ body }) => answering.answerInvitation(deps, body.token, body.coming),
    guesses,
    changesOfMind,
  );
  mount(router, access, calendar, async ({ body }) => answering.calendarFor(deps, body.token), guesses);
  mount(router, access, takeSeat, async ({ body }) => answering.takeLinkedSeat(deps, sittings, body), guesses);
  mount(router, access, eraseOwn, async ({ body }) => answering.eraseOwn(deps, body.token), guesses);
}

const isLink = (token: unknown): token is string => typeof token === 'string' && token.length === 64;
