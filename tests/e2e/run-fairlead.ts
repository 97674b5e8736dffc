import { type ChildProcess, spawn } from 'node:child_process';
import { randomBytes } from 'node:crypto';
import { once } from 'node:events';
import { mkdtempSync, rmSync } from 'node:fs';
import { type AddressInfo, createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { createConnection } from 'mysql2/promise';

export type RunningFairlead = { address: string; said: string; stop: () => Promise<void> };

const top = fileURLToPath(new URL('../..', import.meta.url));

function required(name: string): string {
  const value = process.env[name];
  if (value === undefined) throw new Error(`${name} is not set; run the tests with npm test`);
  return value;
}

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

/** The real server, with its demo unless told otherwise, as a process of its own, over a database of its own. */
export async function runFairlead(environment: Record<string, string> = {}): Promise<RunningFairlead> {
  const name = `fairlead_e2e_${randomBytes(6).toString('hex')}`;
  const account = {
    socketPath: required('TEST_DATABASE_SOCKET'),
    user: required('TEST_DATABASE_USER'),
    password: required('TEST_DATABASE_PASSWORD'),
  };
  const admin = await createConnection(account);
  await admin.query(`create database ${name} character set utf8mb4`);
  const port = await freePort();
  const dataDir = mkdtempSync(join(tmpdir(), 'fairlead-e2e-'));
  const server = spawn('node', ['--import', 'tsx', 'server/main.ts'], {
    cwd: top,
    env: {
      PATH: process.env.PATH,
      NODE_ENV: 'production',
      TSX_TSCONFIG_PATH: 'server/tsconfig.json',
      SESSION_SECRET: randomBytes(32).toString('hex'),
      SIGNING_SECRET: randomBytes(32).toString('hex'),
      PORT: String(port),
      DATA_DIR: dataDir,
      DATABASE_SOCKET: account.socketPath,
      DATABASE_USER: account.user,
      DATABASE_PASSWORD: account.password,
      DATABASE_NAME: name,
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
      await admin.query(`drop database ${name}`);
      await admin.end();
      rmSync(dataDir, { recursive: true });
    },
  };
}
