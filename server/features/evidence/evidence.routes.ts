import type { Router } from 'express';
import { evidenceApi } from '#shared/contracts/evidence.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import * as evidence from './evidence.service.ts';

export function evidenceRoutes(router: Router, access: Access, deps: Deps): void {
  const { list, add, file } = evidenceApi;
  mount(router, access, list, async ({ params }, who) => evidence.listEvidence(deps, who, params.id));
  mount(router, access, add, async ({ params, body, upload }, who) => {
    if (upload === null) throw new Error('a required file was let through without one');
    return evidence.addEvidence(deps, who, params.id, { ...body, upload });
  });
  mount(router, access, file, async ({ params }, who) => evidence.evidenceFile(deps, who, params));
}
