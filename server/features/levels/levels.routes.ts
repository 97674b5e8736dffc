import type { Router } from 'express';
import { levelsApi } from '#shared/contracts/levels.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import type { Sittings } from '../../live/sittings.ts';
import * as levels from './levels.service.ts';

export function levelsRoutes(router: Router, access: Access, deps: Deps, sittings: Sittings): void {
  mount(router, access, levelsApi.get, async ({ params, query }, who) =>
    levels.getLevels(deps, sittings, who, params.id, query.asProctor === 'yes'),
  );
  mount(router, access, levelsApi.record, async ({ params, body }, who) =>
    levels.recordLevels(deps, sittings, who, params.id, body),
  );
  mount(router, access, levelsApi.assign, async ({ params, body }, who) =>
    levels.assignMeasurer(deps, sittings, who, params.id, body.userId),
  );
}
