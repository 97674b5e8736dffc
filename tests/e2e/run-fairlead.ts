import { type ChildProcess, spawn } from 'node:child_process';
import { randomBytes } from 'node:crypto';
import { once } from 'node:events';
import { cpSync, mkdtempSync, rmSync } from 'node:fs';
import { type AddressInfo, createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { databaseAccount, ownDatabase } from './own-database.ts';

export type RunningFairlead = { address: string; said: string; stop: () => Promise<void> };

const top = fileURLToPath(new URL('../..', import.meta.url));

async function freePort(): Promise<number> {
  const probe = createServer().listen(0, '127.0.0.1');
  await once(probe, 'listening');
  const { port } = probe.address() as AddressInfo;
  probe.close();
  await once(probe, 'close');
  return port;
}

/** Resolves with what the server said, once it is up; rejects with its words when it ends before. */
function upOf(server: ChildProcess): Promise<string> {
  return new Promise((resolve, reject) => {
    let said = '';
    const listen = (chunk: Buffer) => {
      said += chunk.toString();
      if (said.includes('Ctrl-C stops it')) resolve(said);
    };
    server.stdout?.on('data', listen);
    server.stderr?.on('data', listen);
    server.once('exit', (status) => reject(new Error(`the server ended with ${status}: ${said}`)));
  });
}

/** The real server as a process of its own, over a database and a folder of data that are named. */
async function serverOver(
  databaseName: string,
  dataDir: string,
  environment: Record<string, string>,
): Promise<RunningFairlead> {
  const port = await freePort();
  const { socketPath, user, password } = databaseAccount();
  const server = spawn('node', ['--import', 'tsx', 'server/main.ts'], {
    cwd: top,
    env: {
      PATH: process.env.PATH,
      NODE_ENV: 'production',
      TSX_TSCONFIG_PATH: 'server/tsconfig.json',
      PORT: String(port),
      DATA_DIR: dataDir,
      DATABASE_SOCKET: socketPath,
      DATABASE_USER: user,
      DATABASE_PASSWORD: password,
      DATABASE_NAME: databaseName,
      LOG_LEVEL: 'error',
      ...environment,
    },
  });
  const said = await upOf(server);
  return {
    address: `http://127.0.0.1:${port}`,
    said,
    stop: async () => {
      server.kill('SIGTERM');
      await once(server, 'exit');
    },
  };
}

// The demo takes a quarter of a minute to make. A server makes it once, before the first test, and is stopped; every other
// one gets a copy of its database and its folder, and its secrets, with which the demo's links and signatures were made.
type MadeDemo = { database: string; dataDir: string; secrets: { SESSION_SECRET: string; SIGNING_SECRET: string } };
const madeDemo = 'FAIRLEAD_E2E_DEMO';

const newSecrets = (): MadeDemo['secrets'] => ({
  SESSION_SECRET: randomBytes(32).toString('hex'),
  SIGNING_SECRET: randomBytes(32).toString('hex'),
});
const newFolder = () => mkdtempSync(join(tmpdir(), 'fairlead-e2e-'));

/** Has the demo made by the real server. Returns how to remove it. */
export async function makeDemo(): Promise<() => Promise<void>> {
  const database = await ownDatabase();
  const demo: MadeDemo = { database: database.name, dataDir: newFolder(), secrets: newSecrets() };
  const server = await serverOver(demo.database, demo.dataDir, demo.secrets);
  await server.stop();
  process.env[madeDemo] = JSON.stringify(demo);
  return async () => {
    await database.remove();
    rmSync(demo.dataDir, { recursive: true });
  };
}

function demoMadeBefore(): MadeDemo {
  const { [madeDemo]: demo } = process.env;
  if (demo === undefined) throw new Error('the demo was not made beforehand');
  return JSON.parse(demo);
}

/** The real server over a database of its own, with the demo in it unless told otherwise. */
export async function runFairlead(environment: Record<string, string> = {}): Promise<RunningFairlead> {
  const demo = environment.FAIRLEAD_DEMO === 'off' ? null : demoMadeBefore();
  const database = await ownDatabase(demo?.database);
  const dataDir = newFolder();
  if (demo !== null) cpSync(demo.dataDir, dataDir, { recursive: true });
  const server = await serverOver(database.name, dataDir, { ...(demo?.secrets ?? newSecrets()), ...environment });
  return {
    ...server,
    stop: async () => {
      await server.stop();
      await database.remove();
      rmSync(dataDir, { recursive: true });
    },
  };
}
