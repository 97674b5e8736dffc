import type { Router } from 'express';
import { measurementsApi } from '#shared/contracts/measurements.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import * as measurements from './measurements.service.ts';

export function measurementsRoutes(router: Router, access: Access, deps: Deps): void {
  const { list, curves, get, add, strike, file } = measurementsApi;
  mount(router, access, list, async ({ params, query }, who) =>
    measurements.listMeasurements(deps, who, params.id, query),
  );
  mount(router, access, curves, async ({ params }, who) => measurements.measuredCurves(deps, who, params.id));
  mount(router, access, get, async ({ params }, who) => measurements.getMeasurement(deps, who, params));
  mount(router, access, add, async ({ params, body, upload }, who) =>
    measurements.addMeasurement(deps, who, params, { draft: body, upload }),
  );
  mount(router, access, strike, async ({ params, body }, who) =>
    measurements.strikeMeasurement(deps, who, params, body.reason),
  );
  mount(router, access, file, async ({ params }, who) => measurements.measurementFile(deps, who, params));
}
