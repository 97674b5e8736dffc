import type { Router } from 'express';
import { rehearsalsApi } from '#shared/contracts/rehearsals.ts';
import { seatsApi } from '#shared/contracts/seats.ts';
import { sessionsApi } from '#shared/contracts/sessions.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import { limit } from '../../http/rate-limit.ts';
import type { Sittings } from '../../live/sittings.ts';
import { beginRehearsal } from './rehearsals.service.ts';
import * as seats from './seats.service.ts';
import * as sessions from './sessions.service.ts';

export function sessionsRoutes(router: Router, access: Access, deps: Deps, sittings: Sittings): void {
  mount(router, access, sessionsApi.list, async ({ query }, who) => sessions.listSessions(deps, who, query));
  mount(router, access, sessionsApi.get, async ({ params }, who) => sessions.getSession(deps, who, params.id));
  mount(router, access, sessionsApi.plan, async ({ params, body }) => sessions.planSession(deps, params, body));
  mount(router, access, sessionsApi.move, async ({ params, body }, who) =>
    sessions.moveSession(deps, sittings, who, params.id, body),
  );
  mount(router, access, sessionsApi.cancel, async ({ params, body }, who) =>
    sessions.cancelSession(deps, sittings, who, params.id, body.reason),
  );

  mount(router, access, rehearsalsApi.begin, async ({ body }, who) =>
    beginRehearsal(deps, sittings, who, body.sessionId),
  );

  // A session code has 30 bits; guessing it must not pay.
  const guesses = limit({ attempts: 60, windowMs: 10 * 60_000, failuresOnly: true });
  mount(router, access, seatsApi.look, async ({ body }) => seats.lookAtSession(deps, sittings, body.code), guesses);
  mount(router, access, seatsApi.take, async ({ body }) => seats.takeSeat(deps, sittings, body), guesses);
}
