import { expect, test } from '@playwright/test';
import { expectAccessible } from './accessible.ts';
import {
  answer,
  beginSession,
  finishSession,
  matched,
  openConsole,
  openPhone,
  openSeating,
  presentTrial,
  signIn,
  takeSeat,
} from './at-the-desk.ts';
import { closeStudy, codeSpecimens, planSession, planStudy, sealStudy } from './plan-a-study.ts';
import { type RunningFairlead, runFairlead } from './run-fairlead.ts';

// Known differences from the form to the report: a check cable, and five of its trials among five others.

let fairlead: RunningFairlead;
test.beforeAll(async () => {
  fairlead = await runFairlead();
});
test.afterAll(async () => {
  await fairlead?.stop();
});

test('check trials are planned, run among the others, and the report says how small a step was heard [S82] [S88]', async ({
  browser,
}) => {
  const manager = await signIn(browser, fairlead.address, 'Maren Oduya');
  await planStudy(manager, { listeners: 1, answerS: 60, trials: 5 });
  const studyAddress = manager.url();

  await manager.goto(`${studyAddress}/edit`);
  const known = manager.getByRole('region', { name: 'Known differences' });
  await known.getByLabel('Put known differences among the trials').selectOption('yes');
  const check = known.getByLabel('Check cable of step 1');
  await check.selectOption((await check.locator('option', { hasText: '1 dB' }).getAttribute('value')) ?? '');
  await known.getByLabel('Trials', { exact: true }).fill('4');
  await expect(known.getByText('It takes at least 5')).toBeVisible();
  await known.getByLabel('Trials', { exact: true }).fill('5');
  await known.getByLabel('Trials of the same with the same').fill('0');
  await expect(known.getByText('5 check trials in each session')).toBeVisible();
  await expectAccessible(manager, 'the form with check trials');
  await manager.locator('form button[type=submit]').click();
  await expect(manager.getByText('5 of 1\u00a0dB, in each session').first()).toBeVisible();
  await sealStudy(manager);
  await codeSpecimens(await signIn(browser, fairlead.address, 'Ines Halloran'), studyAddress);
  await planSession(manager, studyAddress);

  const desk = await signIn(browser, fairlead.address, 'Tomas Brandt');
  await openConsole(desk, 'Study Dunlin');
  const phone = await openPhone(browser, fairlead.address, await openSeating(desk));
  await takeSeat(phone, 'Sofa');
  await beginSession(desk);
  for (let trial = 1; trial <= 10; trial += 1) {
    const codes = presentTrial(desk, trial);
    await expect(desk.getByText('Play next').or(desk.getByText('Playing'))).toBeVisible();
    const [a, , x] = await codes;
    await answer(phone, matched(x === a ? 'A' : 'B'));
    await desk.getByRole('button', { name: `Lock trial ${trial}` }).click();
  }
  await finishSession(desk);

  await closeStudy(manager, studyAddress);
  await expect(manager.getByText('These listeners heard a step of 1\u00a0dB in this set-up.').first()).toBeVisible();
  const found = manager.getByRole('region', { name: 'Known differences' });
  await expect(found.getByText('Sensitive to')).toContainText('1\u00a0dB');
  await expect(found.getByRole('row', { name: /5 of 5 right/ }).first()).toBeVisible();
  await expectAccessible(manager, 'the report');
});
