import { expect, test } from '@playwright/test';
import { expectAccessible } from './accessible.ts';
import { type RunningFairlead, runFairlead } from './run-fairlead.ts';

// An owner makes the organisation's key, hands out its fingerprint, and replaces it.

let fairlead: RunningFairlead;
test.beforeAll(async () => {
  fairlead = await runFairlead({ FAIRLEAD_DEMO: 'off' });
});
test.afterAll(async () => {
  await fairlead.stop();
});

test('an owner makes the signing key, and replaces it with a reason [K5] [K6] [X5]', async ({ page }) => {
  await page.goto(fairlead.said.match(/http\S+\/first-owner#\S+/)?.[0] ?? '');
  await page.getByRole('textbox', { name: 'Organisation' }).fill('Harbour Audio Works');
  await page.getByRole('textbox', { name: 'Your name' }).fill('Edda Quist');
  await page.getByRole('textbox', { name: 'E-mail' }).fill('edda@harbour.example');
  await page.getByRole('textbox', { name: 'Password' }).fill('a very long passphrase');
  await page.getByRole('button', { name: 'Create the organisation' }).click();
  await page.getByRole('link', { name: 'People', exact: true }).click();
  await page.getByRole('link', { name: 'Proof' }).click();
  await expect(page.getByText('The first sealing makes a key')).toBeVisible();
  await expect(page.getByText('its tokens prove nothing about time')).toBeVisible();
  await expectAccessible(page, 'proof without a key');

  const key = page.getByRole('region', { name: 'The key that signs' });
  const fingerprint = key.locator('code');
  await page.getByRole('button', { name: 'Make the key' }).click();
  await expect(fingerprint).toHaveText(/^([0-9a-f]{4} ){15}[0-9a-f]{4}$/);
  const first = (await fingerprint.textContent()) ?? '';
  await expect(key.getByText('Edda Quist')).toBeVisible();

  await page.getByRole('button', { name: 'Replace the key' }).click();
  const question = page.getByRole('alertdialog', { name: 'Replace the signing key?' });
  await expectAccessible(page, 'replacing the key');
  await question.getByRole('button', { name: 'Replace the key' }).click();
  await expect(question.getByText('Write a reason')).toBeVisible();
  await question.getByRole('textbox').fill('A laptop was stolen');
  await question.getByRole('button', { name: 'Replace the key' }).click();
  await expect(question).toBeHidden();
  await expect(fingerprint).not.toHaveText(first);

  const retired = page.getByRole('table', { name: 'Retired keys' }).getByRole('row', { name: first });
  await expect(retired).toContainText('A laptop was stolen');
  await page.getByRole('searchbox', { name: 'Search by fingerprint' }).fill(first.slice(0, 14));
  await page.getByRole('button', { name: 'Search' }).click();
  // The field is a new one once the search stands in the address.
  await page.waitForURL((address) => (address.searchParams.get('q') ?? '').length === 14);
  await expect(page.getByRole('searchbox', { name: 'Search by fingerprint' })).toHaveValue(first.slice(0, 14));
  await expect(retired).toBeVisible();
  await page.getByRole('searchbox', { name: 'Search by fingerprint' }).fill('zz');
  await page.getByRole('button', { name: 'Search' }).click();
  await page.waitForURL(/q=zz/);
  await page.getByRole('link', { name: 'Show all retired keys' }).click();
  await expect(retired).toBeVisible();
  await expectAccessible(page, 'proof');
});
