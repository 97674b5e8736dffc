import type { Router } from 'express';
import { codesApi } from '#shared/contracts/codes.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import * as codes from './codes.service.ts';

export function codesRoutes(router: Router, access: Access, deps: Deps): void {
  mount(router, access, codesApi.status, async ({ params }, who) => codes.codesStatus(deps, params, who));
  mount(router, access, codesApi.draw, async ({ params }, who) => codes.drawCodes(deps, params, who));
  mount(router, access, codesApi.open, async ({ params, body }, who) =>
    codes.openCodes(deps, params, who, body.purpose),
  );
  mount(router, access, codesApi.confirm, async ({ params }, who) => codes.confirmCodes(deps, params, who));
}
