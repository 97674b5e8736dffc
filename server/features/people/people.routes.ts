import type { Router } from 'express';
import { peopleApi } from '#shared/contracts/people.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import type { OpenConsoles } from '../../http/open-consoles.ts';
import { limit } from '../../http/rate-limit.ts';
import * as inviting from '../invitations/inviting.service.ts';
import * as people from './people.service.ts';

export function peopleRoutes(router: Router, access: Access, deps: Deps, consoles: OpenConsoles): void {
  mount(router, access, peopleApi.list, async ({ query }, who) => people.listPeople(deps, who.organisationId, query));
  mount(router, access, peopleApi.changeRole, async ({ params, body }) =>
    people.changeRole(deps, consoles, params, body.role),
  );
  mount(router, access, peopleApi.remove, async ({ params }) => people.removeMember(deps, consoles, params));

  // Whoever gets hold of an owner's sign-in must not make Fairlead a source of unwanted mail.
  const invitations = limit({ attempts: 100, windowMs: 60 * 60_000 });
  mount(router, access, peopleApi.invitations, async ({ query }, who) =>
    inviting.listInvitations(deps, who.organisationId, query),
  );
  mount(router, access, peopleApi.invite, async ({ body }, who) => inviting.invite(deps, who, body), invitations);
  mount(
    router,
    access,
    peopleApi.inviteAgain,
    async ({ params }, who) => inviting.inviteAgain(deps, params, who.userId),
    invitations,
  );
  mount(router, access, peopleApi.withdraw, async ({ params }) => inviting.withdraw(deps, params));
}
