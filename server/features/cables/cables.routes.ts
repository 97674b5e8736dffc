import type { Router } from 'express';
import { cablesApi } from '#shared/contracts/cables.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import * as cables from './cables.service.ts';
import * as exchange from './exchange.service.ts';

export function cablesRoutes(router: Router, access: Access, deps: Deps): void {
  mount(router, access, cablesApi.list, async ({ query }, who) => cables.listCables(deps, who, query));
  mount(router, access, cablesApi.choices, async (_, who) => cables.cableChoices(deps, who));
  mount(router, access, cablesApi.exportAll, async (_, who) => exchange.exportCables(deps, who));
  mount(router, access, cablesApi.template, async () => exchange.cableTemplate());
  mount(router, access, cablesApi.importAll, async ({ body, upload }, who) => {
    if (upload === null) throw new Error('a required file was let through without one');
    return exchange.importCables(deps, who, { isTrial: body.isTrial, upload });
  });
  mount(router, access, cablesApi.get, async ({ params }, who) => cables.getCable(deps, who, params.id));
  mount(router, access, cablesApi.create, async ({ body }, who) => cables.createCable(deps, who, body));
  mount(router, access, cablesApi.update, async ({ params, body }, who) =>
    cables.updateCable(deps, who, params.id, body),
  );
  mount(router, access, cablesApi.archive, async ({ params, body }, who) =>
    cables.archiveCable(deps, who, params.id, body.archived),
  );
  mount(router, access, cablesApi.addSpecimen, async ({ params, body }, who) =>
    cables.addSpecimen(deps, who, params.id, body),
  );
  mount(router, access, cablesApi.updateSpecimen, async ({ params, body }, who) =>
    cables.updateSpecimen(deps, who, params, body),
  );
  mount(router, access, cablesApi.archiveSpecimen, async ({ params, body }, who) =>
    cables.archiveSpecimen(deps, who, params, body.archived),
  );
}
