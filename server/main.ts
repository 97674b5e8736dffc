import 'reflect-metadata';
import { join } from 'node:path';
import { pino } from 'pino';
import { readConfig } from './config.ts';
import { createDataSource } from './db/data-source.ts';
import { withTransaction } from './db/transaction.ts';
import { closeDemo } from './demo/close-demo.ts';
import { demoPeople } from './demo/demo-people.ts';
import { loadDemo } from './demo/load-demo.ts';
import type { Deps } from './deps.ts';
import { folderStore } from './files/file-store.ts';
import { enterEarlierProtocols } from './ledger/registry-log.ts';
import { requireOpenableKeys } from './ledger/signing-keys.ts';
import { pageAddresses } from './mail/page-addresses.ts';
import { onTheNetwork } from './network/on-the-network.ts';
import { ownCertificate } from './network/own-certificate.ts';
import { serve } from './serve.ts';
import { systemClock, systemRandom } from './system.ts';
import { timestampAuthority } from './timestamps/timestamp-authority.ts';

const say = (line: string) => process.stdout.write(`${line}\n`);

async function step<T>(name: string, work: () => Promise<T>): Promise<T> {
  const begun = performance.now();
  const result = await work();
  say(`${name.padEnd(18)}${((performance.now() - begun) / 1000).toFixed(1).padStart(6)} s`);
  return result;
}

async function main(): Promise<void> {
  const config = readConfig(process.env);
  const db = createDataSource(config.database);
  const timestamps = await step('time authority', () => timestampAuthority(config));
  const log = pino({ level: config.logLevel });
  const files = folderStore(join(config.dataDir, 'files'));
  const deps: Deps = { config, db, clock: systemClock, random: systemRandom, timestamps, files, log };
  await step('migrations', async () => {
    await db.initialize();
    await db.runMigrations();
  });
  await withTransaction(db, (tx) => requireOpenableKeys(tx, deps, config.signingSecretLost));
  await withTransaction(db, (tx) => enterEarlierProtocols(tx, deps));
  if (config.demo) await step('demo', () => loadDemo(deps));
  else await closeDemo(db);
  const { lan } = config;
  const certificate =
    lan === null
      ? null
      : await step('certificate', () => ownCertificate(join(config.dataDir, 'tls'), lan.addresses, Date.now()));
  const server = await step('server', () => serve(deps, certificate));

  say(`\nFairlead is at ${config.publicUrl}`);
  if (certificate !== null && server.tlsPort !== null)
    say(await onTheNetwork(config.publicUrl, server.tlsPort, certificate));
  if (config.demo) {
    say(
      lan === null
        ? '\nSign in as:'
        : `\nSign in as (browsers show these on this machine only, at http://127.0.0.1:${config.port}):`,
    );
    for (const { email, password, duty } of demoPeople) say(`  ${email.padEnd(28)}${password.padEnd(20)}${duty}`);
  }
  const token = config.demo ? null : await server.firstOwner.offer();
  if (token !== null) {
    say('\nNobody owns this Fairlead yet. Create your organisation with this link; it works once:');
    say(`  ${pageAddresses.firstOwner(config, token)}`);
  }
  say('\nCtrl-C stops it.');

  const stop = () => {
    server
      .stop()
      .then(() => db.destroy())
      .then(
        () => process.exit(0),
        (error) => {
          deps.log.error({ err: error }, 'stopping failed');
          process.exit(1);
        },
      );
  };
  process.once('SIGINT', stop);
  process.once('SIGTERM', stop);
}

main().catch((error: unknown) => {
  process.stderr.write(`\n${error instanceof Error ? error.message : String(error)}\n`);
  process.exit(1);
});
