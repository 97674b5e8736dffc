import { sha256 } from '@noble/hashes/sha2.js';
import { utf8ToBytes } from '@noble/hashes/utils.js';
import { createConnection } from 'mysql2/promise';
import { Bench } from 'tinybench';
import { canonicalJson } from '#shared/ledger/canonical-json.ts';
import { chainFault, type Entry, nextEntry } from '#shared/ledger/chain.ts';
import { keyedDigest } from '#shared/ledger/digest.ts';
import { abx } from '#shared/methods/abx.ts';
import { drawSession } from '#shared/session/draw.ts';
import { sharedPresentationTest } from '#shared/statistics/shared-presentation-test.ts';
import { HandClock } from '../../server/demo/hand-clock.ts';
import { Console, Phone } from '../support/live.ts';
import { makeOrganisation, readyStudy } from '../support/people.ts';
import { begin, presentTrial } from '../support/run-session.ts';
import { nameDatabases, removeDatabases } from '../support/test-database.ts';
import { testServer } from '../support/test-server.ts';

// What Fairlead does, as a multiple of the least work that could do it, timed in the same run on the same machine. The
// limits are about three times what was measured when they were set: they catch a change of order, not a busy machine.

type Pair = { name: string; floor: string; limit: number; work: () => unknown; least: () => unknown };

const ratios: { name: string; floor: string; ratio: number; limit: number }[] = [];

async function compare({ name, floor, limit, work, least }: Pair): Promise<void> {
  const bench = new Bench({ time: 1_500, warmupTime: 300 }).add('work', work).add('least', least);
  await bench.run();
  const median = (task: string): number => {
    const result = bench.getTask(task)?.result;
    if (result === undefined || result.error !== undefined) throw result?.error ?? new Error(`${task} did not run`);
    const { samples } = result;
    return samples.toSorted((a, b) => a - b)[samples.length >> 1] ?? Number.NaN;
  };
  ratios.push({ name, floor, ratio: median('work') / median('least'), limit });
}

function chainOf(count: number): Entry[] {
  const entries: Entry[] = [];
  for (let index = 0; index < count; index += 1) {
    const payload = { trial: index, leaves: [{ seat: 'L01', leaf: 'a'.repeat(64) }] };
    const content = { study: 'bench', at: '2026-12-05T18:00:00.000Z', kind: 'bench', version: 1, payload };
    entries.push(nextEntry(entries.at(-1) ?? null, { ...content, nonce: 'b'.repeat(32) }));
  }
  return entries;
}

async function pureWork(): Promise<void> {
  const entries = chainOf(2_000);
  const texts = entries.map((entry) => utf8ToBytes(canonicalJson(entry)));
  await compare({
    name: 'a chain of 2,000 entries verified',
    floor: 'its bytes hashed once',
    limit: 8,
    work: () => chainFault(entries),
    least: () => texts.map((text) => sha256(text)),
  });

  const seed = 'c'.repeat(64);
  const key = new Uint8Array(32);
  await compare({
    name: 'the draw of a session of 40 trials',
    floor: '43 HMACs, one for each number drawn',
    limit: 6,
    work: () => drawSession(seed, abx, { specimenCounts: [2, 2], trials: 40 }),
    least: () => Array.from({ length: 43 }, (_, index) => keyedDigest(key, new Uint8Array([index]))),
  });

  const trials = Array.from({ length: 160 }, (_, index) => ({
    counts: [(index * 5) % 13, 12 - ((index * 5) % 13)],
    truth: index % 2,
    missing: 0,
  }));
  await compare({
    name: 'the exact test of 160 trials, 12 listeners',
    floor: 'the same convolution in floating point',
    limit: 15,
    work: () => sharedPresentationTest(trials, 'greater'),
    least: () => {
      let ways = new Float64Array([1]);
      for (const { counts } of trials) {
        const next = new Float64Array(ways.length + Math.max(...counts));
        for (const count of counts)
          for (let index = 0; index < ways.length; index += 1)
            next[index + count] = (next[index + count] ?? 0) + (ways[index] ?? 0);
        ways = next;
      }
      return ways;
    },
  });
}

/** One answer over a real socket into the real database, against one row committed there. */
async function liveWork(): Promise<void> {
  const clock = new HandClock(Date.parse('2026-12-05T18:00:00.000Z'));
  nameDatabases();
  const server = await testServer({ clock });
  const people = await makeOrganisation(server, 'Bench');
  const { sessionId } = await readyStudy(server, people);
  const desk = await Console.open(server.address, people.proctor.email, sessionId);
  const code = await desk.openSeating();
  const phones: Phone[] = [];
  for (const name of ['left', 'middle', 'right']) phones.push(await Phone.join(server.address, code, name));
  await begin(desk, phones, clock);
  await presentTrial(desk, clock);

  const { socketPath, username, password, database } = server.deps.db.options as unknown as Record<string, string>;
  const row = await createConnection({ socketPath, user: username, password, database });
  await row.query('create table bench (id int auto_increment primary key, text varchar(200)) engine=InnoDB');
  await compare({
    name: 'an answer: tapped, stored, receipt on the phone',
    floor: 'one row committed in the same database',
    limit: 40,
    work: () => phones[0]?.answer(1, 'A'),
    least: () => row.query('insert into bench (text) values (?)', ['d'.repeat(150)]),
  });
  await row.end();
  for (const page of [desk, ...phones]) page.close();
  await server.stop();
  await removeDatabases();
}

await pureWork();
await liveWork();
for (const { name, floor, ratio, limit } of ratios) {
  const verdict = ratio <= limit ? 'within' : 'BEYOND';
  console.log(`${ratio.toFixed(1).padStart(7)} x  ${name}\n           the floor: ${floor}; ${verdict} ${limit} x`);
}
if (ratios.some(({ ratio, limit }) => ratio > limit)) process.exitCode = 1;
