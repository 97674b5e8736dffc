import type { Router } from 'express';
import { publicationsApi } from '#shared/contracts/publications.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import * as publications from './publications.service.ts';

export function publicationsRoutes(router: Router, access: Access, deps: Deps): void {
  mount(router, access, publicationsApi.list, async ({ query }) => publications.listPublications(deps, query));
  mount(router, access, publicationsApi.get, async ({ params }) => publications.getPublication(deps, params.id));
  mount(router, access, publicationsApi.signedHeads, async ({ params }) =>
    publications.publishedHeadProofs(deps, params.id),
  );
  mount(router, access, publicationsApi.ofStudy, async ({ params }) => publications.publicationOf(deps, params));
  mount(router, access, publicationsApi.publish, async ({ params, body }, who) =>
    publications.publish(deps, params, who.userId, body),
  );
  mount(router, access, publicationsApi.withdraw, async ({ params, body }, who) =>
    publications.withdraw(deps, params, who.userId, body.reason),
  );
  mount(router, access, publicationsApi.shelve, async ({ params, body }, who) =>
    publications.shelve(deps, params, who.userId, body.reason),
  );
}
