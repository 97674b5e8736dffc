import { expect, type Page } from '@playwright/test';
import { type MethodId, methodOf } from '#shared/methods/methods.ts';

// What the manager and the code holder do before anybody listens, all of it by hand in the browser.

/** What a manager chooses: the method, the settings to be switched on by their labels, and the attribute if it asks for one. */
export type ChosenMethod = { id: MethodId; settings?: readonly string[]; attribute?: string };

export type Plan = {
  listeners: number;
  answerS: number;
  title?: string;
  trials?: number;
  method?: ChosenMethod;
  /** Part of the name of the rig's preset; one without waits unless it is said otherwise. */
  rig?: string;
  /** Whether what comes again in a trial has specimens of its own; then all of each cable are taken. */
  isSeparate?: boolean;
};

/** Plans a study through the form, of eight trials and ABX unless it is said otherwise; leaves the page on its draft. */
export async function planStudy(manager: Page, plan: Plan): Promise<void> {
  const { title = 'Study Dunlin', method } = plan;
  await manager.getByRole('link', { name: 'Studies', exact: true }).click();
  await manager.getByRole('link', { name: 'Plan a study' }).first().click();
  await manager.getByLabel('Neutral title').fill(title);
  await manager.getByLabel('Question').fill('Can three listeners tell the two cables apart?');
  if (method !== undefined) await chooseMethod(manager, method);
  await choose(manager, method?.attribute === undefined ? 'One cable' : 'The cable that should have more', '0.5 twin');
  await choose(manager, 'The other cable', '4.0 twin');
  await manager.getByLabel('ST-0412').check();
  await manager.getByLabel('SF-0077').check();
  if (plan.isSeparate) await manager.getByLabel(/from separate specimens/).check();
  await manager.getByLabel('Listeners per session').fill(String(plan.listeners));
  await manager.getByLabel('Trials per session').fill(String(plan.trials ?? 8));
  for (;;) {
    const extra = manager.getByRole('button', { name: /^Remove excerpt/ });
    if ((await extra.count()) === 0) break;
    await extra.last().click();
  }
  await manager.getByLabel('Excerpt 1').fill('Piano');
  await manager.getByLabel('Length', { exact: true }).fill('2');
  await choose(manager, 'Rig', plan.rig ?? 'Bench');
  await manager.getByLabel('Chain').fill('Player, amplifier, loudspeakers');
  await manager.getByLabel('Length of a change').fill('3');
  await manager.getByLabel('Answer window').fill(String(plan.answerS));
  await choose(manager, 'Code holder', 'Ines Halloran');
  await manager.locator('form button[type=submit]').click();
  await expect(manager.getByRole('heading', { level: 1 })).toContainText(title);
}

async function chooseMethod(manager: Page, { id, settings = [], attribute }: ChosenMethod): Promise<void> {
  await manager.getByLabel('Method').selectOption(id);
  await expect(manager.getByText(methodOf(id).explanation)).toBeVisible();
  for (const setting of settings) await manager.getByLabel(setting).check();
  if (attribute !== undefined) await manager.getByLabel('More of what?').fill(attribute);
}

/** Seals the study whose page is open. */
export async function sealStudy(manager: Page): Promise<void> {
  await manager.getByRole('button', { name: /^Seal/ }).first().click();
  await manager.getByRole('alertdialog').getByRole('button', { name: /^Seal/ }).click();
  await expect(manager.getByRole('alertdialog')).toBeHidden();
}

/** Draws the codes, opens the sheet of sleeve labels and confirms the sleeves. */
export async function codeSpecimens(holder: Page, studyAddress: string): Promise<void> {
  await holder.goto(`${studyAddress}/codes`);
  await holder.getByRole('button', { name: /^Draw \d+ codes/ }).click();
  await holder.getByRole('link', { name: 'Go to the labels' }).click();
  await holder.getByRole('button', { name: 'I am alone: open the sheet' }).click();
  await expect(holder.getByRole('region', { name: 'Labels for the sleeves' })).toBeVisible();
  await holder.goto(`${studyAddress}/codes`);
  await holder.getByRole('button', { name: 'All are sleeved and coded' }).click();
  await holder.getByRole('button', { name: 'Yes, every one' }).click();
  await expect(holder.getByRole('heading', { name: 'Done' })).toBeVisible();
}

/** Plans the session with its proctor. */
export async function planSession(manager: Page, studyAddress: string): Promise<void> {
  await manager.goto(`${studyAddress}/sessions/new`);
  await manager.getByLabel('Date and time').fill('2027-01-15T19:30');
  await manager.getByLabel('Room').fill('Room B');
  await choose(manager, 'Proctor', 'Tomas Brandt');
  await manager.locator('form button[type=submit]').click();
  await manager.waitForURL((address) => !address.pathname.endsWith('/new'));
}

/** Closes the study after its session and opens its report. */
export async function closeStudy(manager: Page, studyAddress: string): Promise<void> {
  await manager.goto(studyAddress);
  await manager
    .getByRole('button', { name: /^Close/ })
    .first()
    .click();
  await manager
    .getByRole('alertdialog')
    .getByRole('button', { name: /^Close/ })
    .click();
  await manager.waitForURL(`${studyAddress}/report`);
  await expect(manager.getByRole('heading', { name: 'What you may say' })).toBeVisible();
}

async function choose(page: Page, label: string, part: string): Promise<void> {
  const select = page.getByLabel(label, { exact: true });
  const option = select.locator('option', { hasText: part }).first();
  await select.selectOption((await option.getAttribute('value')) ?? '');
}
