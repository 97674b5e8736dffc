import type { Router } from 'express';
import { observersApi } from '#shared/contracts/observers.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import type { Sittings } from '../../live/sittings.ts';
import * as observers from './observers.service.ts';

export function observersRoutes(router: Router, access: Access, deps: Deps, sittings: Sittings): void {
  mount(router, access, observersApi.list, async ({ params }, who) =>
    observers.listObservers(deps, sittings, who, params.id),
  );
  mount(router, access, observersApi.plan, async ({ params, body }, who) =>
    observers.planObserver(deps, who, params.id, body),
  );
  mount(router, access, observersApi.withdraw, async ({ params }) => observers.withdrawObserver(deps, params));
}
