import type { Router } from 'express';
import { rigPresetsApi } from '#shared/contracts/rig-presets.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import * as presets from './rig-presets.service.ts';

export function rigPresetsRoutes(router: Router, access: Access, deps: Deps): void {
  mount(router, access, rigPresetsApi.list, async ({ params, query }) =>
    presets.listPresets(deps, params.organisationId, query),
  );
  mount(router, access, rigPresetsApi.choices, async ({ params }) =>
    presets.presetChoices(deps, params.organisationId),
  );
  mount(router, access, rigPresetsApi.get, async ({ params }) => presets.getPreset(deps, params));
  mount(router, access, rigPresetsApi.create, async ({ params, body }) =>
    presets.createPreset(deps, params.organisationId, body),
  );
  mount(router, access, rigPresetsApi.update, async ({ params, body }) => presets.updatePreset(deps, params, body));
  mount(router, access, rigPresetsApi.archive, async ({ params, body }) =>
    presets.archivePreset(deps, params, body.archived),
  );
}
