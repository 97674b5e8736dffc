import { expect, test } from '@playwright/test';
import { expectAccessible } from './accessible.ts';
import { signIn } from './at-the-desk.ts';
import { planStudy, sealStudy } from './plan-a-study.ts';
import { type RunningFairlead, runFairlead } from './run-fairlead.ts';

// Known differences in the form and in a report: what runs between them is walked through without a browser, in
// tests/live/check-trials.test.ts.

let fairlead: RunningFairlead;
test.beforeAll(async () => {
  fairlead = await runFairlead();
});
test.afterAll(async () => {
  await fairlead?.stop();
});

test('check trials are planned in the form, and a report says how small a step was heard [S88] [S89]', async ({
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
  await expect(manager.getByText('5 of 1\u00a0dB, in each session').first()).toBeVisible();

  // The demo has a closed study with a ladder of two steps.
  await manager.getByRole('link', { name: 'Reports', exact: true }).click();
  await manager.getByRole('listitem').filter({ hasText: 'Study Dotterel' }).getByRole('link').click();
  await expect(manager.getByText('These listeners heard a step of 0.51\u00a0dB in this set-up.').first()).toBeVisible();
  const found = manager.getByRole('region', { name: 'Known differences' });
  await expect(found.getByText('Sensitive to')).toContainText('0.51\u00a0dB');
  await expect(found.getByText(/^Registered second result/)).toBeVisible();
  await expectAccessible(manager, 'the report');
});
