import type { Router } from 'express';
import { reportsApi } from '#shared/contracts/reports.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import * as reports from './reports.service.ts';

export function reportsRoutes(router: Router, access: Access, deps: Deps): void {
  mount(router, access, reportsApi.list, async ({ query }, who) =>
    reports.listReports(deps, who.organisationId, query),
  );
  mount(router, access, reportsApi.get, async ({ params }) => reports.getReport(deps, params));
}
