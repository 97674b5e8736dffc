import type { Router } from 'express';
import { signingKeysApi } from '#shared/contracts/signing-keys.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import * as keys from './signing-keys.service.ts';

export function signingKeysRoutes(router: Router, access: Access, deps: Deps): void {
  mount(router, access, signingKeysApi.list, async ({ query }, who) => keys.listKeys(deps, who.organisationId, query));
  mount(router, access, signingKeysApi.rotate, async ({ body }, who) => keys.rotate(deps, who, body));
}
