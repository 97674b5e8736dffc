import { type ChildProcess, spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, rmSync } from 'node:fs';
import { type AddressInfo, createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { chainFault } from '#shared/ledger/chain.ts';
import { Answer } from '../../server/features/sessions/answer.entity.ts';
import { readRecord } from '../../server/ledger/ledger.ts';
import { Console, Phone } from '../support/live.ts';
import { makeOrganisation, readyStudy, type TestOrganisation } from '../support/people.ts';
import { type TestServer, testServer } from '../support/test-server.ts';
import { until } from '../support/until.ts';

// The real server as a process of its own, killed with SIGKILL at ten points of a running session and started again.

async function freePort(): Promise<number> {
  const probe = createServer().listen(0, '127.0.0.1');
  await once(probe, 'listening');
  const { port } = probe.address() as AddressInfo;
  probe.close();
  await once(probe, 'close');
  return port;
}

describe('a server that is killed', () => {
  let helper: TestServer;
  let people: TestOrganisation;
  let study: Awaited<ReturnType<typeof readyStudy>>;
  let port: number;
  let killed: ChildProcess;
  const dataDir = mkdtempSync(join(tmpdir(), 'fairlead-killed-'));

  const start = async (): Promise<void> => {
    const { database } = helper.deps.config;
    killed = spawn('node', ['--import', 'tsx', 'server/main.ts'], {
      env: {
        PATH: process.env.PATH,
        TSX_TSCONFIG_PATH: 'server/tsconfig.json',
        SESSION_SECRET: helper.deps.config.sessionSecret,
        SIGNING_SECRET: helper.deps.config.signingSecret,
        FAIRLEAD_DEMO: 'off',
        PORT: String(port),
        DATA_DIR: dataDir,
        DATABASE_SOCKET: database.socketPath,
        DATABASE_USER: database.user,
        DATABASE_PASSWORD: database.password,
        DATABASE_NAME: database.name,
        LOG_LEVEL: 'error',
      },
    });
    let said = '';
    const listen = (chunk: Buffer) => {
      said += chunk.toString();
    };
    killed.stdout?.on('data', listen);
    killed.stderr?.on('data', listen);
    await until(`the server to come up: ${said}`, () => said.includes('Fairlead is at'), 60_000);
  };
  const kill = async (): Promise<void> => {
    const gone = once(killed, 'exit');
    killed.kill('SIGKILL');
    await gone;
  };

  beforeAll(async () => {
    helper = await testServer();
    people = await makeOrganisation(helper, 'Harbour');
    study = await readyStudy(helper, people, {
      changeS: 3,
      answerS: 120,
      programme: [{ title: 'Noise', lengthS: 2, start: '' }],
    });
    port = await freePort();
    await start();
  }, 60_000);
  afterAll(async () => {
    await kill();
    await helper.stop();
    rmSync(dataDir, { recursive: true });
  });

  it('loses no acknowledged answer, doubles none, and the chain holds [S14]', async () => {
    const address = `http://127.0.0.1:${port}`;
    const desk = await Console.open(address, people.proctor.email, study.sessionId);
    const code = await desk.openSeating();
    const phones = [await Phone.join(address, code, 'left'), await Phone.join(address, code, 'right')];
    const [left, right] = phones as [Phone, Phone];
    const acknowledged: { seat: string; trial: number; choice: string; leaf: string }[] = [];
    let kills = 0;
    const killAndReturn = async () => {
      kills += 1;
      await kill();
      await start();
      for (const page of [desk, left, right]) await until('the sockets back', () => page.socket.connected, 60_000);
      const entries = await readRecord(helper.deps.db.manager, study.studyId);
      const restarts = entries.filter(({ kind }) => kind === 'server-restarted').length;
      expect(restarts).toBe(kills);
      const ofSession = entries.filter(({ payload }) => payload.session === 1).length;
      await desk.sees('the state from before', (view) => view.version === ofSession);
      expect(chainFault(entries)).toBeNull();
    };
    const step = (name: string) => desk.act({ kind: 'confirm-step', step: name });
    const listen = async () => {
      await until(
        'the change to be over',
        () => desk.now.trial?.endsAt !== null && Date.now() >= (desk.now.trial?.endsAt ?? Number.POSITIVE_INFINITY),
      );
      await step('unmute');
    };
    const present = async () => {
      const { trial } = await desk.sees('a change', (view) => view.trial?.stage === 'change');
      for (const name of ['mute', 'unplug', 'fit', 'check'].slice(trial?.stepsDone.length ?? 0)) await step(name);
      await listen();
      await desk.sees('the excerpt over', (view) => view.trial?.stage !== 'listening');
    };
    const answer = async (phone: Phone, trial: number, choice: string) => {
      const { leaf } = await phone.answer(trial, choice);
      acknowledged.push({ seat: phone.seat, trial, choice, leaf });
    };

    await killAndReturn(); // 1: while seating
    await desk.act({ kind: 'close-seating' });
    await left.reveal();
    await killAndReturn(); // 2: between two reveals
    await right.reveal();
    await desk.sees('the draw fixed', (view) => view.phase === 'running');
    await killAndReturn(); // 3: before the familiarisation
    await desk.act({ kind: 'begin-familiarisation' });
    await step('mute');
    await killAndReturn(); // 4: within a change
    await present();
    await present();
    await desk.sees('the familiarisation over', (view) => view.familiarised);
    await desk.act({ kind: 'begin-trial' });
    await killAndReturn(); // 5: a trial just opened
    for (let count = 0; count < 3; count += 1) await present();
    await killAndReturn(); // 6: answers open, none given
    await answer(left, 1, 'A');
    await killAndReturn(); // 7: one of two answers held
    await left.sees('the answer from before', (view) => view.trial?.held?.choice === 'A');
    await answer(right, 1, 'B');
    await killAndReturn(); // 8: all held, not locked
    await desk.act({ kind: 'lock-trial' });
    await killAndReturn(); // 9: locked
    await left.sees('the receipt', (view) => view.lastLock?.trial === 1);
    await desk.act({ kind: 'pause', reason: 'break' });
    await killAndReturn(); // 10: paused
    expect(desk.now.paused?.reason).toBe('break');

    const rows = await helper.deps.db.manager.find(Answer, {
      where: { sessionId: study.sessionId },
      order: { seat: 'ASC' },
    });
    expect(rows.map(({ seat, trial, choice, leaf }) => ({ seat, trial, choice, leaf }))).toEqual(acknowledged);
    expect(kills).toBe(10);
    for (const page of [desk, left, right]) page.close();
  }, 300_000);
});
