import { expect, type Page } from '@playwright/test';

// What the manager and the code holder do before anybody listens, all of it by hand in the browser.

export type Plan = { listeners: number; answerS: number; trials?: number; preference?: boolean };

/** Plans a study through the form, of eight trials and ABX unless it is said otherwise; leaves the page on its draft. */
export async function planStudy(manager: Page, plan: Plan): Promise<void> {
  await manager.getByRole('link', { name: 'Studies', exact: true }).click();
  await manager.getByRole('link', { name: 'Plan a study' }).first().click();
  await manager.getByLabel('Neutral title').fill('Study Dunlin');
  await manager.getByLabel('Question').fill('Can three listeners tell the two cables apart?');
  if (plan.preference === true) {
    await manager.getByLabel('Method').selectOption('paired-preference');
    await manager.getByLabel('Offer “no preference” as an answer').check();
  }
  await choose(manager, 'One cable', '0.5 twin');
  await choose(manager, 'The other cable', '4.0 twin');
  await manager.getByLabel('ST-0412').check();
  await manager.getByLabel('SF-0077').check();
  await manager.getByLabel('Listeners per session').fill(String(plan.listeners));
  await manager.getByLabel('Trials per session').fill(String(plan.trials ?? 8));
  for (;;) {
    const extra = manager.getByRole('button', { name: /^Remove excerpt/ });
    if ((await extra.count()) === 0) break;
    await extra.last().click();
  }
  await manager.getByLabel('Excerpt 1').fill('Piano');
  await manager.getByLabel('Length', { exact: true }).fill('2');
  await manager.getByLabel('Chain').fill('Player, amplifier, loudspeakers');
  await manager.getByLabel('Length of a change').fill('3');
  await manager.getByLabel('Answer window').fill(String(plan.answerS));
  await choose(manager, 'Code holder', 'Ines Halloran');
  await manager.locator('form button[type=submit]').click();
  await expect(manager.getByRole('heading', { level: 1 })).toContainText('Study Dunlin');
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

async function choose(page: Page, label: string, part: string): Promise<void> {
  const select = page.getByLabel(label, { exact: true });
  const option = select.locator('option', { hasText: part }).first();
  await select.selectOption((await option.getAttribute('value')) ?? '');
}
