import type { Router } from 'express';
import { signedHeadsApi } from '#shared/contracts/signed-heads.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import { studyHeadProofs, timeStateOf } from './signed-heads.service.ts';

export function signedHeadsRoutes(router: Router, access: Access, deps: Deps): void {
  mount(router, access, signedHeadsApi.ofStudy, async ({ params }) => studyHeadProofs(deps, params));
  mount(router, access, signedHeadsApi.time, async (_given, who) => timeStateOf(deps, who.organisationId));
}
