import { createServer, type Server } from 'node:http';
import { createServer as createTlsServer } from 'node:https';
import type { AddressInfo } from 'node:net';
import { createApp } from './app.ts';
import type { Deps } from './deps.ts';
import { forgetOldAttempts } from './features/account/account.service.ts';
import { forgetExpiredResets } from './features/account/password-resets.service.ts';
import { auditWhenDue } from './features/audits/audits.service.ts';
import { forgetExpired } from './http/sign-in.ts';
import { serveSockets } from './live/socket-server.ts';
import { forgetOldTexts, Postman } from './mail/postman.ts';
import type { OwnCertificate } from './network/own-certificate.ts';
import { Timekeeper } from './timestamps/timekeeper.ts';

const hourMs = 60 * 60 * 1000;
const firstAuditMs = 5 * 60 * 1000;

function listen(http: Pick<Server, 'once' | 'listen' | 'address'>, port: number, host: string): Promise<number> {
  return new Promise((resolve, reject) => {
    http.once('error', reject);
    http.listen(port, host, () => resolve((http.address() as AddressInfo).port));
  });
}

async function sweep(deps: Deps): Promise<void> {
  await forgetExpired(deps.db, deps.clock.now());
  await forgetOldTexts(deps);
  await forgetExpiredResets(deps);
  await forgetOldAttempts(deps);
}

/**
 * Opens the port, takes up the sessions that were open, and returns how to stop. Port 0 takes any free one. With a
 * certificate the same is served under TLS, on a port beside it.
 */
export async function serve(deps: Deps, certificate: Pick<OwnCertificate, 'key' | 'cert'> | null = null) {
  const { app, sittings, signedIn, mounted, consoles, firstOwner } = createApp(deps);
  const http = createServer(app);
  const https = certificate === null ? null : createTlsServer({ key: certificate.key, cert: certificate.cert }, app);
  const io = serveSockets(http, deps, sittings, signedIn);
  if (https !== null) io.engine.attach(https, { path: io.path() });
  consoles.watch(io, async (sessionId) => (await sittings.of(sessionId)).memory.session.organisationId);
  await sittings.resumeAll();
  await sweep(deps);
  const sweeping = setInterval(() => {
    sweep(deps).catch((error) => deps.log.error({ err: error }, 'sweeping failed'));
    audit();
  }, hourMs);
  let auditing = Promise.resolve();
  const audit = () => {
    auditing = auditing
      .then(() => auditWhenDue(deps))
      .catch((error) => deps.log.error({ err: error }, 'the records could not be audited'));
  };
  // A start has more urgent things to do, and the tokens of the demo are still on their way.
  const firstAudit = setTimeout(audit, firstAuditMs);
  const postman = deps.config.smtp === null ? null : new Postman(deps, deps.config.smtp);
  postman?.start();
  const timekeeper = deps.timestamps === null ? null : new Timekeeper(deps, deps.timestamps);
  timekeeper?.start();
  const { config } = deps;
  const port = await listen(http, config.port, config.host);
  const tlsPort = https === null ? null : await listen(https, config.lan?.tlsPort ?? 0, config.host);
  const stop = async () => {
    clearInterval(sweeping);
    clearTimeout(firstAudit);
    await postman?.stop();
    await timekeeper?.stop();
    await auditing;
    await sittings.stop();
    await io.close();
    http.closeAllConnections();
    https?.close();
    https?.closeAllConnections();
  };
  return { port, tlsPort, stop, sittings, mounted, firstOwner };
}
