import type { Router } from 'express';
import { usersApi } from '#shared/contracts/users.ts';
import { withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import { membersOf } from './users.store.ts';
import { waitingFor } from './waiting.service.ts';

export function usersRoutes(router: Router, access: Access, deps: Deps): void {
  mount(router, access, usersApi.members, async (_, who) =>
    withTransaction(deps.db, async (tx) => {
      const members = await membersOf(tx, who.organisationId);
      return { members: members.map(({ userId, user, role }) => ({ id: userId, name: user.name, role })) };
    }),
  );
  mount(router, access, usersApi.waiting, async (_, who) => ({ items: await waitingFor(deps, who) }));
}
