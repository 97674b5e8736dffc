import { type ChildProcess, spawn } from 'node:child_process';
import { randomBytes } from 'node:crypto';
import { once } from 'node:events';
import { type AddressInfo, createServer } from 'node:net';
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

/** The real server as a process of its own, over the database that is named. */
async function serverOver(databaseName: string, environment: Record<string, string>): Promise<RunningFairlead> {
  const port = await freePort();
  const { socketPath, user, password } = databaseAccount();
  const server = spawn('node', ['--import', 'tsx', 'server/main.ts'], {
    cwd: top,
    env: {
      PATH: process.env.PATH,
      NODE_ENV: 'production',
      TSX_TSCONFIG_PATH: 'server/tsconfig.json',
      SESSION_SECRET: randomBytes(32).toString('hex'),
      PORT: String(port),
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
// one gets a copy of its database, and its secret, from which the links in the demo's mails were made.
const madeDemo = { database: 'FAIRLEAD_E2E_DEMO', secret: 'FAIRLEAD_E2E_SECRET' } as const;

/** Has the demo made by the real server. Returns how to remove it. */
export async function makeDemo(): Promise<() => Promise<void>> {
  const database = await ownDatabase();
  const secret = randomBytes(32).toString('hex');
  const server = await serverOver(database.name, { SESSION_SECRET: secret });
  await server.stop();
  process.env[madeDemo.database] = database.name;
  process.env[madeDemo.secret] = secret;
  return database.remove;
}

/** The real server over a database of its own, with the demo in it unless told otherwise. */
export async function runFairlead(environment: Record<string, string> = {}): Promise<RunningFairlead> {
  const isDemo = environment.FAIRLEAD_DEMO !== 'off';
  const { [madeDemo.database]: demo, [madeDemo.secret]: secret } = process.env;
  if (isDemo && (demo === undefined || secret === undefined)) throw new Error('the demo was not made beforehand');
  const database = await ownDatabase(isDemo ? demo : undefined);
  const server = await serverOver(database.name, {
    ...(isDemo && secret !== undefined ? { SESSION_SECRET: secret } : {}),
    ...environment,
  });
  return {
    ...server,
    stop: async () => {
      await server.stop();
      await database.remove();
    },
  };
}
