import { type Browser, expect, type Page, test } from '@playwright/test';
import type { Report } from '#shared/contracts/reports.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { expectAccessible } from './accessible.ts';
import {
  answer,
  beginSession,
  type Choice,
  finishSession,
  openConsole,
  openPhone,
  openSeating,
  presentTrial,
  signIn,
  takeSeat,
} from './at-the-desk.ts';
import { type ChosenMethod, closeStudy, codeSpecimens, planSession, planStudy, sealStudy } from './plan-a-study.ts';
import { type RunningFairlead, runFairlead } from './run-fairlead.ts';

// Triangle and same-different from their plan to their report, by hand, with a proctor and two phones; every p is counted
// again here, draw by draw, from the codes that the console showed and the answers that were tapped. Duo-trio and the
// directional comparison up to their seal.

// Each of them may run beside the others.
test.describe.configure({ mode: 'parallel' });

let fairlead: RunningFairlead;
test.beforeAll(async () => {
  fairlead = await runFairlead();
});
test.afterAll(async () => {
  await fairlead?.stop();
});

const trialCount = 5;
type Heard = { codes: string[]; choices: [string, string] };
type Asked = {
  title: string;
  method: ChosenMethod;
  presentations: number;
  choices: { [value: string]: Choice };
  /** What the two listeners answer, of whom the first can tell the codes apart. */
  choose: (codes: string[], trial: number) => [string, string];
};

const apiOf = (studyAddress: string) => studyAddress.replace('/organisations/', '/api/organisations/');

/** Plans a study of two listeners and seals it. Returns its address. */
async function planAndSeal(manager: Page, title: string, method: ChosenMethod): Promise<string> {
  await planStudy(manager, { title, method, listeners: 2, answerS: 60, trials: trialCount });
  const studyAddress = manager.url();
  await sealStudy(manager);
  return studyAddress;
}

/** The whole journey; leaves the manager on the report. */
async function run(browser: Browser, { title, method, presentations, choices, choose }: Asked) {
  const manager = await signIn(browser, fairlead.address, 'Maren Oduya');
  const studyAddress = await planAndSeal(manager, title, method);
  const holder = await signIn(browser, fairlead.address, 'Ines Halloran');
  await codeSpecimens(holder, studyAddress);
  await planSession(manager, studyAddress);

  const desk = await signIn(browser, fairlead.address, 'Tomas Brandt');
  await openConsole(desk, title);
  const code = await openSeating(desk);
  const phones = [
    await openPhone(browser, fairlead.address, code),
    await openPhone(browser, fairlead.address, code, 640),
  ] as const;
  await takeSeat(phones[0], 'Left');
  await takeSeat(phones[1], 'Right');
  for (const phone of phones) await expect(phone.getByText(methodOf(method.id).explanation)).toBeVisible();
  await beginSession(desk);
  const heard: Heard[] = [];
  for (let trial = 1; trial <= trialCount; trial += 1) {
    const codes = await presentTrial(desk, trial, presentations);
    const tapped = choose(codes, trial);
    for (const [seat, phone] of phones.entries()) {
      const choice = choices[tapped[seat] ?? ''];
      if (choice === undefined) throw new Error(`the phone offers no ${tapped[seat]}`);
      if (trial === 1) {
        await expect(phone.getByRole('heading', { name: methodOf(method.id).question({}) })).toBeVisible();
        await expectAccessible(phone, 'question');
      }
      await answer(phone, choice);
      await phone.getByText('held by the server').waitFor();
    }
    heard.push({ codes, choices: tapped });
    await desk.getByRole('button', { name: `Lock trial ${trial}` }).click();
  }
  await finishSession(desk);

  await closeStudy(manager, studyAddress);
  await expectAccessible(manager, 'report');
  const report: Report = await (await manager.request.get(`${apiOf(studyAddress)}/report`)).json();
  await expect(manager.getByRole('heading', { level: 1 })).toHaveText(report.finding.headline);
  expect(report.record.checks.filter(({ outcome }) => outcome !== 'pass')).toEqual([]);
  const trials = report.sessions[0]?.trials ?? [];
  expect(trials.map(({ outcome }) => outcome)).toEqual(heard.map(() => 'locked'));
  expect(trials.map(({ answers }) => answers.map(({ choice }) => choice))).toEqual(heard.map((trial) => trial.choices));

  // The holder's sheet says which code was which cable, and so what the record must call the draw.
  const sheet = await holder.request.post(`${apiOf(studyAddress)}/codes/open`, { data: { purpose: 'check' } });
  const { rows }: { rows: { code: string; cable: string }[] } = await sheet.json();
  const cableOf = new Map(rows.map(({ code, cable }) => [code, cable]));
  expect(trials.map(({ truth }) => truth)).toEqual(
    heard.map(({ codes }) => codes.map((fitted) => (cableOf.get(fitted) === report.cables[0] ? 'A' : 'B')).join('')),
  );
  return { manager, report, heard };
}

/** Every list of so many of these values. */
function lists<T>(values: readonly T[], length: number): T[][] {
  if (length === 0) return [[]];
  return lists(values, length - 1).flatMap((list) => values.map((value) => [...list, value]));
}

/** The share of the draws that find at least as much in the answers as the real draw did. */
function shareOf<T>(draws: readonly T[][], real: readonly T[], found: (draw: readonly T[]) => number): number {
  return draws.filter((draw) => found(draw) >= found(real)).length / draws.length;
}

const places = ['first', 'second', 'third'];

/** The place of the code that was fitted once. */
const oddPlace = (codes: readonly string[]) =>
  places[codes.findIndex((code) => codes.filter((other) => other === code).length === 1)] ?? '';

test('a triangle from its plan to a report that a count of all draws agrees with [C1] [C2] [S17]', async ({
  browser,
}) => {
  const { manager, report, heard } = await run(browser, {
    title: 'Study Plover',
    method: { id: 'triangle' },
    presentations: 3,
    choices: Object.fromEntries(
      places.map((place) => [
        place,
        { sentence: `The ${place} was the odd one`, short: `the ${place}`, among: places.length },
      ]),
    ),
    choose: (codes, trial) => [trial === 3 ? 'second' : oddPlace(codes), 'first'],
  });
  const odd = heard.map(({ codes }) => oddPlace(codes));
  const draws = lists(places, trialCount);
  const rightOf = (seats: readonly (0 | 1)[]) => (draw: readonly string[]) =>
    heard.reduce((sum, { choices }, trial) => sum + seats.filter((seat) => choices[seat] === draw[trial]).length, 0);

  const { result } = report;
  if (result.method !== 'triangle') throw new Error(`the report is of ${result.method}`);
  expect(result).toMatchObject({ test: 'shared-presentations', trials: 5, answers: 10, missing: 0 });
  expect(result.correct).toBe(rightOf([0, 1])(odd));
  expect(Number(result.p.value)).toBeCloseTo(shareOf(draws, odd, rightOf([0, 1])), 11);
  expect(result.byListener.map(({ p }) => Number(p).toFixed(10))).toEqual(
    ([0, 1] as const).map((seat) => shareOf(draws, odd, rightOf([seat])).toFixed(10)),
  );
  await expect(manager.getByText(`${result.correct} / 10`).first()).toBeVisible();
});

test('same-different from its plan to a report that a count of all choices agrees with [H1] [H2] [H4]', async ({
  browser,
}) => {
  const isPairDifferent = ([first, second]: readonly string[]) => first !== second;
  const { manager, report, heard } = await run(browser, {
    title: 'Study Sandpiper',
    method: { id: 'same-different' },
    presentations: 2,
    choices: {
      same: { sentence: 'They were the same', short: 'same', among: 2 },
      different: { sentence: 'They were different', short: 'different', among: 2 },
    },
    choose: (codes, trial) => [isPairDifferent(codes) ? 'different' : 'same', trial % 2 === 0 ? 'same' : 'different'],
  });
  const different = heard.map(({ codes }) => isPairDifferent(codes));
  const differentTrials = different.filter(Boolean).length;
  const draws = lists([true, false], trialCount).filter((draw) => draw.filter(Boolean).length === differentTrials);
  const hitsOf = (seats: readonly (0 | 1)[]) => (draw: readonly boolean[]) =>
    heard.reduce(
      (sum, { choices }, trial) =>
        sum + (draw[trial] === true ? seats.filter((seat) => choices[seat] === 'different').length : 0),
      0,
    );
  const hits = hitsOf([0, 1])(different);
  const falseAlarms = hitsOf([0, 1])(different.map((isDifferent) => !isDifferent));

  const { result } = report;
  if (result.method !== 'same-different') throw new Error(`the report is of ${result.method}`);
  expect(result).toMatchObject({ trials: 5, differentTrials, answers: 10, missing: 0 });
  expect([result.onDifferent.different, result.onSame.different]).toEqual([hits, falseAlarms]);
  expect(Number(result.p.value)).toBeCloseTo(shareOf(draws, different, hitsOf([0, 1])), 11);
  expect(result.byListener.map(({ p }) => Number(p).toFixed(10))).toEqual(
    ([0, 1] as const).map((seat) => shareOf(draws, different, hitsOf([seat])).toFixed(10)),
  );
  await expect(manager.getByText(`${hits} / ${2 * differentTrials}`).first()).toBeVisible();
  await expect(manager.getByText(`${falseAlarms} / ${2 * (trialCount - differentTrials)}`).first()).toBeVisible();
  await expect(manager.getByText(/% right/)).toHaveCount(0);
});

test('duo-trio and a directional comparison are planned and sealed [C1] [C4]', async ({ browser }) => {
  const manager = await signIn(browser, fairlead.address, 'Maren Oduya');
  for (const [title, method, facts] of [
    ['Study Redshank', { id: 'duo-trio' }, ['Duo-trio']],
    [
      'Study Greenshank',
      { id: 'directional-comparison', attribute: 'bass' },
      ['Directional paired comparison', 'bass', 'The cable that should have more'],
    ],
  ] as const) {
    const studyAddress = await planAndSeal(manager, title, method);
    for (const fact of facts) await expect(manager.getByText(fact, { exact: true }).first()).toBeVisible();
    const study = await (await manager.request.get(apiOf(studyAddress))).json();
    expect(study).toMatchObject({ state: 'sealed', draft: { method: method.id } });
    await expectAccessible(manager, title);
  }
});
