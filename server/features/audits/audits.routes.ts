import type { Router } from 'express';
import { auditsApi } from '#shared/contracts/audits.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import { latestAudit } from './audits.service.ts';

export function auditsRoutes(router: Router, access: Access, deps: Deps): void {
  mount(router, access, auditsApi.latest, async (_given, who) => latestAudit(deps, who.organisationId));
}
