import { readFileSync, writeFileSync } from 'node:fs';
import { expect, type Page, test } from '@playwright/test';
import { expectAccessible } from './accessible.ts';
import { signIn } from './at-the-desk.ts';
import { type RunningFairlead, runFairlead } from './run-fairlead.ts';

// A stranger keeps the head of a registry; a manager amends a sealed protocol; the stranger sees that the log has grown.

let fairlead: RunningFairlead;
test.beforeAll(async () => {
  fairlead = await runFairlead();
});
test.afterAll(async () => {
  await fairlead.stop();
});

async function keep(page: Page, link: RegExp, path: string): Promise<string> {
  const [file] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('link', { name: link }).first().click(),
  ]);
  await file.saveAs(path);
  return readFileSync(path, 'utf8');
}

test('a registry can only grow, and a visitor’s browser finds out [E8] [E9]', async ({ browser }, info) => {
  const page = await (await browser.newContext({ viewport: { width: 390, height: 844 } })).newPage();
  await page.goto(`${fairlead.address}/sign-in`);
  await page.getByRole('region', { name: 'Published here' }).getByRole('link').first().click();
  await page.getByRole('link', { name: 'Every protocol that this publisher has sealed' }).click();
  await page.getByRole('heading', { name: /^Sealed protocols of/ }).waitFor();
  await expectAccessible(page, 'registry');
  const registry = page.url();
  await expect(page.getByText('Study Heron')).toHaveCount(0);

  const head = info.outputPath('registry-head.json');
  const { size } = JSON.parse(await keep(page, /^Download the head/, head));
  const entry = info.outputPath('registry-entry.json');
  await keep(page, /^Proof that entry/, entry);
  const check = (path: string) => page.locator('input[type=file]').setInputFiles(path);
  const outcome = page.getByRole('region', { name: 'Check a head that you kept' }).getByRole('status');
  await check(head);
  await expect(outcome).toContainText('The log has only grown.');
  await expect(outcome).toContainText('none since');
  const bent = info.outputPath('bent.json');
  writeFileSync(
    bent,
    readFileSync(head, 'utf8').replace(/"root":"./, (start) => `${start.slice(0, -1)}z`),
  );
  await check(bent);
  await expect(outcome).toContainText('is neither a head nor an entry of a registry');
  writeFileSync(bent, readFileSync(head, 'utf8').replace(`"size":${size}`, `"size":${size - 1}`));
  await check(bent);
  await expect(outcome).toContainText('its signature does not match what it says');

  const manager = await signIn(browser, fairlead.address, 'Maren Oduya');
  await manager.getByRole('link', { name: 'Studies', exact: true }).first().click();
  await manager.getByRole('link', { name: 'Study Heron' }).first().click();
  await manager.getByRole('link', { name: 'Amend the protocol' }).click();
  await manager.getByRole('button', { name: 'See what changes' }).click();
  await expect(manager.getByText('Nothing differs.')).toBeVisible();
  await manager.getByRole('button', { name: 'Back to the form' }).click();
  await manager.getByLabel('Spares').fill('4');
  await manager.getByRole('button', { name: 'See what changes' }).click();
  await expect(manager.getByText('4 in each session')).toBeVisible();
  await expectAccessible(manager, 'amendment');
  await manager.getByRole('button', { name: 'Seal version 2 for good' }).click();
  await expect(manager.getByText('Say why the protocol is amended')).toBeVisible();
  await manager.getByLabel('Why the protocol is amended').fill('More spares for a noisy street.');
  await manager.getByRole('button', { name: 'Seal version 2 for good' }).click();
  await expect(manager.getByRole('heading', { name: 'Version 2, in force' })).toBeVisible();
  await expect(manager.getByText('More spares for a noisy street.')).toBeVisible();
  await expectAccessible(manager, 'versions');

  await page.goto(registry);
  await expect(page.getByText('Amended before data').last()).toBeVisible();
  for (const kept of [head, entry]) {
    await check(kept);
    await expect(outcome).toContainText('The log has only grown.');
    await expect(outcome).toContainText('1\u00a0entry since');
  }
});

test('a registry reads without a script, and says where there is none [E9]', async ({ browser }) => {
  const page = await (await browser.newContext({ javaScriptEnabled: false })).newPage();
  await page.goto(`${fairlead.address}/p`);
  await page.getByRole('listitem').getByRole('link').first().click();
  await page.getByRole('link', { name: 'Every protocol that this publisher has sealed' }).click();
  await expect(page.getByRole('heading', { name: /^Sealed protocols of/ })).toBeVisible();
  await expect(page.getByText('Fingerprint of the key')).toBeVisible();
  const nowhere = await browser.newPage();
  const reply = await nowhere.goto(`${fairlead.address}/registry/11111111-2222-4333-8444-555555555555`);
  expect(reply?.status()).toBe(404);
  await expect(nowhere.getByText('There is no registry at this address.')).toBeVisible();
});
