import { expect, type Page, test } from '@playwright/test';
import type { Study } from '#shared/contracts/studies.ts';
import { expectAccessible } from './accessible.ts';
import { signIn } from './at-the-desk.ts';
import { planStudy, sealStudy } from './plan-a-study.ts';
import { type RunningFairlead, runFairlead } from './run-fairlead.ts';

// A manager without statistics plans how much listening a study takes, in the form and in a real browser.

let fairlead: RunningFairlead;
test.beforeAll(async () => {
  fairlead = await runFairlead();
});
test.afterAll(async () => {
  await fairlead.stop();
});

async function newStudy(page: Page): Promise<void> {
  await page.getByRole('link', { name: 'Studies', exact: true }).click();
  await page.getByRole('link', { name: 'Plan a study' }).first().click();
  await expect(page.getByRole('heading', { name: 'Plan a study' })).toBeVisible();
}

test('what is to be found becomes a number of trials, by keyboard alone [W2] [W3] [W4] [W9]', async ({ browser }) => {
  const manager = await signIn(browser, fairlead.address, 'Maren Oduya');
  await newStudy(manager);
  const plan = manager.getByRole('complementary', { name: 'What this plan comes to' });
  await expect(plan.getByRole('heading', { name: 'Why 42 and not 37' })).toBeVisible();
  await expect(plan.getByText('The 16 planned find it in 45 % of studies, and are too few.')).toBeVisible();

  await manager.getByRole('slider', { name: 'Find listeners who are right' }).focus();
  for (let step = 0; step < 5; step++) await manager.keyboard.press('ArrowRight');
  await expect(manager.getByLabel('Right', { exact: true })).toHaveValue('75');
  await expect(manager.getByLabel('Heard')).toHaveValue('50');
  await expect(manager.getByLabel('d′')).toHaveValue('2.02');
  await expect(plan.getByRole('heading', { name: 'Why 28 and not 23' })).toBeVisible();

  await manager.getByLabel('d′').fill('1.72');
  await expect(manager.getByLabel('Right', { exact: true })).toHaveValue('70.1');
  await manager.getByLabel('Right', { exact: true }).fill('120');
  await expect(manager.getByText('Enter 50.5 to 99.')).toBeVisible();
  await expect(manager.getByLabel('Heard')).toHaveValue('40.2');
  await manager.getByLabel('Heard').fill('40');

  await plan.getByRole('button', { name: 'Plan 3 sessions of 14 trials' }).focus();
  await manager.keyboard.press('Enter');
  await expect(manager.getByLabel('Sessions', { exact: true })).toHaveValue('3');
  await expect(manager.getByLabel('Trials per session')).toHaveValue('14');
  await expect(plan.getByRole('heading', { name: 'Plan 42 trials. 27 right are needed.' })).toBeVisible();
  await expect(plan.getByText('find it in 84 % of studies, and are enough.')).toBeVisible();
  await expect(plan.getByRole('heading', { name: 'Why 42 and not 37' })).toBeFocused();

  await plan.getByText('As a table').click();
  await expect(plan.getByRole('row', { name: '37 81 % first above' })).toBeVisible();
  await expect(plan.getByRole('row', { name: '42 84 % stays above, planned' })).toBeVisible();
  await manager.getByLabel('Sessions', { exact: true }).fill('1');
  await manager.getByLabel('Trials per session').fill('20');
  await expect(plan.getByText('18 trials would find it more often than 20.')).toBeVisible();
  await expectAccessible(manager, 'the planner');
});

test('a margin is registered, and the plan says what it takes and what each count would mean [W5] [W7] [W8]', async ({
  browser,
}) => {
  const manager = await signIn(browser, fairlead.address, 'Maren Oduya');
  await newStudy(manager);
  const plan = manager.getByRole('complementary', { name: 'What this plan comes to' });
  const margin = manager.getByLabel('If nobody hears it, I want to be able to say so');
  await expect(
    manager.getByText('To show that fewer than 20 % of answers are above guessing would take 227 trials'),
  ).toBeVisible();
  await expect(plan.getByText('register a margin')).toBeVisible();
  await expect(plan.getByText('an above-chance rate up to 45% is not excluded')).toBeVisible();

  await margin.selectOption('yes');
  await expect(plan.getByText('With at most 5 right the study shows')).toBeVisible();
  await expect(plan.getByText('With 16 trials only 11 % of studies in which there is nothing show')).toBeVisible();
  await plan.getByText('What each count would mean').click();
  await expect(plan.getByRole('row', { name: /^5\b.*Below the margin\./ })).toBeVisible();
  await expect(plan.getByRole('row', { name: /^12 to 13\b.*Difference\./ })).toBeVisible();
  await expectAccessible(manager, 'the planner with a margin');

  await manager.getByLabel('Share of answers above guessing, below').fill('95');
  await manager.getByRole('button', { name: 'Save the draft' }).click();
  await expect(manager.getByText('At most 90')).toBeVisible();

  await manager.getByLabel('Method').selectOption('same-different');
  await expect(margin).toBeDisabled();
  await expect(manager.getByText('Same-different has no scale')).toBeVisible();
  await expect(plan.getByText('No fixed number of hits can be promised.')).toBeVisible();
});

test('a group is simulated, its number of trials and its margin too [W1] [W3] [W6]', async ({ browser }) => {
  const manager = await signIn(browser, fairlead.address, 'Maren Oduya');
  await newStudy(manager);
  const plan = manager.getByRole('complementary', { name: 'What this plan comes to' });
  await manager.getByLabel('Listeners per session').fill('6');
  await manager.getByLabel('If nobody hears it, I want to be able to say so').selectOption('yes');
  await expect(plan.getByText(/About \d+\strials, each heard by 6, find 70\s% right/)).toBeVisible({ timeout: 60_000 });
  await expect(plan.getByText('so many of 2,000 simulated ones')).toBeVisible();
  await expect(plan.getByText('there is one coin per trial, not one per answer. So no table')).toBeVisible();
  await expect(plan.getByText('Plan trials, not heads.')).toBeVisible();
  await expectAccessible(manager, 'the planner of a group');
});

test('a margin and whom listeners are drawn from are kept with the draft and sealed, and what is to be found is not [W2] [W5]', async ({
  browser,
}) => {
  const manager = await signIn(browser, fairlead.address, 'Maren Oduya');
  await planStudy(manager, { listeners: 1, answerS: 15 });
  await manager.getByRole('link', { name: 'Edit the draft' }).click();
  await manager.getByLabel('If nobody hears it, I want to be able to say so').selectOption('yes');
  await manager.getByLabel('Share of answers above guessing, below').fill('30');
  await manager.getByLabel('Whom are the listeners drawn from?').fill('Members of a listening club');
  await manager.getByLabel('Heard').fill('20');
  await manager.locator('form button[type=submit]').click();
  await expect(manager.getByText('Members of a listening club')).toBeVisible();
  await expect(manager.getByText('30 %, shown by a one-sided 95 % limit')).toBeVisible();
  await manager.getByRole('link', { name: 'Edit the draft' }).click();
  await expect(manager.getByLabel('Share of answers above guessing, below')).toHaveValue('30');
  await expect(manager.getByLabel('Heard')).toHaveValue('40');
  await manager.getByRole('link', { name: 'Cancel' }).click();

  // A study that is to show that what is heard is small, sealed with its margin.
  await sealStudy(manager);
  const study: Study = await (
    await manager.request.get(manager.url().replace('/organisations/', '/api/organisations/'))
  ).json();
  expect(study).toMatchObject({ state: 'sealed', draft: { marginPercent: 30 }, sealed: { version: 1 } });
  await expect(manager.getByText('30 %, shown by a one-sided 95 % limit')).toBeVisible();
  await expect(manager.getByText('counted as wrong, as right against the margin')).toBeVisible();
});
