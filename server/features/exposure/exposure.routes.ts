import type { Router } from 'express';
import { exposureApi } from '#shared/contracts/exposure.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import { getExposure } from './exposure.service.ts';

export function exposureRoutes(router: Router, access: Access, deps: Deps): void {
  mount(router, access, exposureApi.get, async ({ params }, who) => getExposure(deps, who, params.id));
}
