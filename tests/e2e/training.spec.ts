import { expect, test } from '@playwright/test';
import { expectAccessible } from './accessible.ts';
import {
  answer,
  beginSession,
  matched,
  openConsole,
  openPhone,
  openSeating,
  present,
  signIn,
  takeSeat,
} from './at-the-desk.ts';
import { checkStep, readyStudy } from './ready-study.ts';
import { type RunningFairlead, runFairlead } from './run-fairlead.ts';

// What may be heard before the first trial: practice on a known difference, which tells the listener what was right.

let fairlead: RunningFairlead;
test.beforeAll(async () => {
  fairlead = await runFairlead();
});
test.afterAll(async () => {
  await fairlead?.stop();
});

test('a listener practises on a known difference and is told, then the first trial begins [S131] [S133]', async ({
  browser,
}) => {
  const manager = await signIn(browser, fairlead.address, 'Maren Oduya');
  const steps = [await checkStep(manager, { milliDb: 1000, trials: 1 })];
  await readyStudy(manager, await signIn(browser, fairlead.address, 'Ines Halloran'), {
    checks: { reference: 0, steps, same: 0, excludes: false },
  });
  const desk = await signIn(browser, fairlead.address, 'Tomas Brandt');
  await openConsole(desk, 'Study Dunlin');
  const phone = await openPhone(browser, fairlead.address, await openSeating(desk));
  await takeSeat(phone, 'Left');
  await beginSession(desk);

  await expect(desk.getByRole('heading', { name: 'Train the ears first' })).toBeVisible();
  await expectAccessible(desk, 'training');
  await desk.getByRole('button', { name: 'With feedback: the known difference' }).click();
  const codes: string[] = [];
  for (const _ of ['A', 'B', 'X']) codes.push(await present(desk));
  await expect(phone.getByText('Practice 1, not counted')).toBeVisible();
  await answer(phone, matched('A'));
  await desk.getByRole('button', { name: 'End this practice' }).click();

  // The codes say what X was, and so what the phone must say of the answer A.
  const isRight = codes[2] === codes[0];
  await expect(phone.getByRole('heading', { name: isRight ? 'Right' : 'Not this time' })).toBeVisible();
  await expect(phone.getByText(`X was the same as ${isRight ? 'A' : 'B'}.`)).toBeVisible();
  await expectAccessible(phone, 'told');
  await expect(desk.getByText('Practice trials so far: 1.')).toBeVisible();

  await desk.getByRole('button', { name: 'Begin trial 1' }).click();
  await expect(desk.getByRole('heading', { name: 'Train the ears first' })).toBeHidden();
  await expect(phone.getByText('Trial 1 of 6')).toBeVisible();
});
