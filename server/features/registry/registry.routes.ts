import type { Response, Router } from 'express';
import { registryApi } from '#shared/contracts/registry.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import { limit } from '../../http/rate-limit.ts';
import * as registry from './registry.service.ts';

const asFile = (response: Response, name: string) => response.attachment(name).type('application/json');

export function registryRoutes(router: Router, access: Access, deps: Deps): void {
  // A proof costs a pass over the log: enough for whoever checks every entry of a long one, and no more.
  const asked = limit({ attempts: 1200, windowMs: 10 * 60_000 });
  mount(
    router,
    access,
    registryApi.list,
    async ({ params, query }) => registry.listRegistry(deps, params.organisationId, query),
    asked,
  );
  mount(
    router,
    access,
    registryApi.head,
    async ({ params, response }) => {
      const head = await registry.getHead(deps, params.organisationId);
      asFile(response, 'registry-head.json');
      return head;
    },
    asked,
  );
  mount(
    router,
    access,
    registryApi.keys,
    async ({ params }) => registry.listRegistryKeys(deps, params.organisationId),
    asked,
  );
  mount(
    router,
    access,
    registryApi.inclusion,
    async ({ params, response }) => {
      const proof = await registry.proveInclusion(deps, params.organisationId, params.index);
      asFile(response, `registry-entry-${params.index}.json`);
      return proof;
    },
    asked,
  );
  mount(
    router,
    access,
    registryApi.consistency,
    async ({ params, query }) => registry.proveConsistency(deps, params.organisationId, query),
    asked,
  );
}
