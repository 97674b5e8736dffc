import { randomUUID } from 'node:crypto';
import { existsSync } from 'node:fs';
import { join, resolve } from 'node:path';
import express, { type Express, Router } from 'express';
import helmet from 'helmet';
import { pinoHttp } from 'pino-http';
import type { Deps } from './deps.ts';
import { accountRoutes } from './features/account/account.routes.ts';
import { apiReferenceRoutes } from './features/api-reference/api-reference.routes.ts';
import { attendancesRoutes } from './features/attendances/attendances.routes.ts';
import { auditsRoutes } from './features/audits/audits.routes.ts';
import { cablesRoutes } from './features/cables/cables.routes.ts';
import { codesRoutes } from './features/codes/codes.routes.ts';
import { evidenceRoutes } from './features/evidence/evidence.routes.ts';
import { exposureRoutes } from './features/exposure/exposure.routes.ts';
import { firstOwnerRoutes } from './features/first-owner/first-owner.routes.ts';
import { FirstOwner } from './features/first-owner/first-owner.service.ts';
import { healthRoutes, version } from './features/health/health.routes.ts';
import { invitationsRoutes } from './features/invitations/invitations.routes.ts';
import { levelsRoutes } from './features/levels/levels.routes.ts';
import { mailRoutes } from './features/mail/mail.routes.ts';
import { measurementsRoutes } from './features/measurements/measurements.routes.ts';
import { peopleRoutes } from './features/people/people.routes.ts';
import { publicPages } from './features/publications/public-pages.ts';
import { publicationsRoutes } from './features/publications/publications.routes.ts';
import { registryRoutes } from './features/registry/registry.routes.ts';
import { reportsRoutes } from './features/reports/reports.routes.ts';
import { rigPresetsRoutes } from './features/rig-presets/rig-presets.routes.ts';
import { sessionsRoutes } from './features/sessions/sessions.routes.ts';
import { signInRoutes } from './features/sign-in/sign-in.routes.ts';
import { signedHeadsRoutes } from './features/signed-heads/signed-heads.routes.ts';
import { signingKeysRoutes } from './features/signing-keys/signing-keys.routes.ts';
import { studiesRoutes } from './features/studies/studies.routes.ts';
import { usersRoutes } from './features/users/users.routes.ts';
import type { Access } from './http/access.ts';
import type { Mounted } from './http/mount.ts';
import { OpenConsoles } from './http/open-consoles.ts';
import { nothingHere, problemHandler } from './http/problem-handler.ts';
import { signInMiddleware } from './http/sign-in.ts';
import { Sittings } from './live/sittings.ts';

const oneYearMs = 365 * 24 * 60 * 60 * 1000;

function contentSecurity() {
  return helmet({
    // Fairlead is also served over plain http on a local network, where these two would break it.
    strictTransportSecurity: false,
    contentSecurityPolicy: {
      directives: {
        defaultSrc: ["'self'"],
        imgSrc: ["'self'", 'data:'],
        styleSrc: ["'self'", "'unsafe-inline'"],
        connectSrc: ["'self'", 'ws:', 'wss:'],
        frameAncestors: ["'none'"],
        upgradeInsecureRequests: null,
      },
    },
    referrerPolicy: { policy: 'no-referrer' },
  });
}

/** Serves the built client: its files under their digests for a year, its page for every other address. */
function serveClient(app: Express, clientDir: string): void {
  const root = resolve(clientDir);
  const page = join(root, 'index.html');
  app.use('/assets', express.static(join(root, 'assets'), { immutable: true, maxAge: oneYearMs, fallthrough: false }));
  app.use(express.static(root, { index: false }));
  app.get('/{*any}', (_request, response, next) => {
    if (!existsSync(page)) return next();
    response.set('cache-control', 'no-cache').sendFile(page);
  });
}

/** Wires the application from what it is given; opens no port and reads no environment. */
export function createApp(deps: Deps) {
  const { config, db, log, clock } = deps;
  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', config.trustProxy ? 1 : false);
  app.set('query parser', 'simple');
  app.use(contentSecurity());
  app.use(
    pinoHttp({
      logger: log,
      genReqId: () => randomUUID(),
      serializers: {
        req: ({ id, method, url }) => ({ id, method, path: String(url).split('?')[0] }),
        res: ({ statusCode }) => ({ statusCode }),
      },
      customLogLevel: (_request, response, error) =>
        error !== undefined || response.statusCode >= 500 ? 'error' : 'debug',
    }),
  );

  const mounted: Mounted[] = [];
  const access: Access = { db, log, strictReplies: config.strictReplies, mounted };
  const signedIn = signInMiddleware(db, config, () => clock.now());
  const sittings = new Sittings(deps);
  const consoles = new OpenConsoles(deps);
  const firstOwner = new FirstOwner(deps);

  const api = Router();
  api.use((_request, response, next) => {
    response.set('cache-control', 'no-store');
    next();
  });
  api.use(express.json({ limit: '256kb' }));
  api.use(signedIn);
  healthRoutes(api, access, deps);
  signInRoutes(api, access, deps, consoles);
  accountRoutes(api, access, deps, consoles);
  firstOwnerRoutes(api, access, deps, firstOwner);
  usersRoutes(api, access, deps);
  peopleRoutes(api, access, deps, consoles);
  invitationsRoutes(api, access, deps);
  cablesRoutes(api, access, deps);
  rigPresetsRoutes(api, access, deps);
  measurementsRoutes(api, access, deps);
  evidenceRoutes(api, access, deps);
  studiesRoutes(api, access, deps, sittings);
  codesRoutes(api, access, deps);
  sessionsRoutes(api, access, deps, sittings);
  levelsRoutes(api, access, deps, sittings);
  exposureRoutes(api, access, deps);
  attendancesRoutes(api, access, deps, sittings);
  reportsRoutes(api, access, deps);
  publicationsRoutes(api, access, deps);
  registryRoutes(api, access, deps);
  mailRoutes(api, access, deps);
  signingKeysRoutes(api, access, deps);
  signedHeadsRoutes(api, access, deps);
  auditsRoutes(api, access, deps);
  apiReferenceRoutes(api, mounted, version);
  api.use(nothingHere);
  app.use('/api', api);
  app.use(publicPages(deps));
  serveClient(app, config.clientDir);
  app.use(nothingHere);
  app.use(problemHandler(log));
  return { app, mounted, sittings, signedIn, consoles, firstOwner };
}
