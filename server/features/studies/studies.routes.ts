import type { Router } from 'express';
import { studiesApi } from '#shared/contracts/studies.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import type { Sittings } from '../../live/sittings.ts';
import { amendStudy, previewAmendment } from './amending.service.ts';
import { closeStudy } from './closing.service.ts';
import { sealStudy } from './sealing.service.ts';
import * as studies from './studies.service.ts';

export function studiesRoutes(router: Router, access: Access, deps: Deps, sittings: Sittings): void {
  mount(router, access, studiesApi.list, async ({ query }, who) =>
    studies.listStudies(deps, who.organisationId, query),
  );
  mount(router, access, studiesApi.get, async ({ params }) => studies.getStudy(deps, params));
  mount(router, access, studiesApi.create, async ({ body }, who) =>
    studies.createStudy(deps, who.organisationId, who.userId, body),
  );
  mount(router, access, studiesApi.update, async ({ params, body }) => studies.updateStudy(deps, params, body));
  mount(router, access, studiesApi.discard, async ({ params }) => studies.discardStudy(deps, params));
  mount(router, access, studiesApi.seal, async ({ params }, who) => sealStudy(deps, params, who.userId));
  mount(router, access, studiesApi.previewAmendment, async ({ params, body }) => previewAmendment(deps, params, body));
  mount(router, access, studiesApi.amend, async ({ params, body }, who) =>
    amendStudy(deps, sittings, params, who.userId, body),
  );
  mount(router, access, studiesApi.deviate, async ({ params, body }) =>
    studies.recordDeviation(deps, params, body.text),
  );
  mount(router, access, studiesApi.close, async ({ params, body }, who) =>
    closeStudy(deps, params, who.userId, body.reason),
  );
}
