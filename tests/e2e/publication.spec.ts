import { readFileSync } from 'node:fs';
import { expect, type Page, test } from '@playwright/test';
import { expectAccessible } from './accessible.ts';
import { type RunningFairlead, runFairlead } from './run-fairlead.ts';

// A stranger without an account reads a published study and checks it in the browser; a manager publishes another.

let fairlead: RunningFairlead;
test.beforeAll(async () => {
  fairlead = await runFairlead();
});
test.afterAll(async () => {
  await fairlead.stop();
});

const outcomes = (page: Page) =>
  page
    .locator('[data-check]')
    .evaluateAll((lines) =>
      lines.map((line) => `${line.getAttribute('data-check')} ${line.lastElementChild?.lastElementChild?.textContent}`),
    );

const allPass = ['file', 'record', 'protocol', 'commitments', 'draws', 'answers', 'trials', 'listeners', 'figures'].map(
  (id) => `${id} pass`,
);

async function openPublication(page: Page): Promise<string> {
  await page.goto(`${fairlead.address}/sign-in`);
  await page.getByRole('region', { name: 'Published here' }).getByRole('link').first().click();
  await page.waitForURL(/\/p\/\w{8}$/);
  return page.url();
}

test('a stranger reads a publication without a script, and checks it in the browser [V7] [V12]', async ({
  browser,
}) => {
  const page = await (await browser.newContext()).newPage();
  const address = await openPublication(page);

  const plain = await browser.newContext({ javaScriptEnabled: false });
  const reader = await plain.newPage();
  await reader.goto(address);
  const finding = await reader.getByRole('heading', { level: 1 }).textContent();
  await expect(reader.getByText('What may be said')).toBeVisible();
  await expect(reader.getByText('Changes between presentations lasted 30 s')).toBeVisible();
  await expect(reader.getByRole('heading', { name: 'Session 2, abandoned' })).toBeVisible();
  await expect(reader.getByText('Fingerprint of the key')).toBeVisible();

  await page.goto(address);
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(finding ?? '');
  await expect(page.getByText('All 9 checks pass.')).toBeVisible();
  await expect(page.getByText('It is the file that was published')).toBeVisible();
  expect(await outcomes(page)).toEqual(allPass);
  const heads = page.getByRole('region', { name: 'Signed and time-stamped' });
  await expect(heads.getByRole('rowheader', { name: 'Published' })).toBeVisible();
  await expect(heads.getByText('its tokens prove nothing about time')).toBeVisible();
  const [file] = await Promise.all([
    page.waitForEvent('download'),
    heads.getByRole('link', { name: /^Download/ }).click(),
  ]);
  expect(JSON.parse(readFileSync(await file.path(), 'utf8')).format).toBe('fairlead-signed-heads');
  await expectAccessible(page, 'publication');
});

test('one altered byte of the download fails the right check on the page [V2] [V12]', async ({ page }) => {
  const address = await openPublication(page);
  const publication = await (await page.request.get(address.replace('/p/', '/api/publications/'))).json();
  const whole = await (await page.request.get(fairlead.address + publication.file.path)).text();
  // A published study begins with its answers (canonical JSON sorts names), so each of these lies in the part it names.
  const alterations = [
    { check: 'answers', pattern: /"choice":"([AB])"/, put: (was: string) => (was === 'A' ? 'B' : 'A') },
    { check: 'draws', pattern: /"truths":\["([AB])"/, put: (was: string) => (was === 'A' ? 'B' : 'A') },
    { check: 'protocol', pattern: /"chain":"(N)etwork/, put: () => 'M' },
    {
      check: 'record',
      pattern: /"kind":"protocol-sealed","nonce":"(.)/,
      put: (was: string) => (was === '0' ? '1' : '0'),
    },
    {
      check: 'commitments',
      pattern: /"secrets":\{"codeKey":\{"rows":\[\{"cable":0,"code":"\d\d(\d)/,
      put: (was: string) => (was === '0' ? '1' : '0'),
    },
    {
      check: 'figures',
      pattern: /"result":\{"alpha":"0.05","alternative":"greater","answers":2(4)(?=.*"secrets":)/,
      put: () => '5',
      last: true,
    },
  ];
  for (const { check, pattern, put, last } of alterations) {
    const found = [...whole.matchAll(new RegExp(pattern, 'gd'))];
    const match = last === true ? found.at(-1) : found[0];
    const [at = 0] = match?.indices?.[1] ?? [];
    expect(at, check).toBeGreaterThan(0);
    const altered = whole.slice(0, at) + put(whole.charAt(at)) + whole.slice(at + 1);
    await page.route('**/p/*/*.json', (route) => route.fulfill({ contentType: 'application/json', body: altered }));
    await page.goto(address);
    await expect(page.getByText(/of 9 checks pass/)).toBeVisible();
    expect((await outcomes(page)).filter((line) => line.endsWith(' fail'))).toEqual([`${check} fail`]);
    await expect(page.getByText('it was altered on its way to you')).toBeVisible();
    if (check === 'answers') await expectAccessible(page, 'altered');
    await page.unroute('**/p/*/*.json');
  }
});

test('a visitor downloads the record and checks a file of their own [V12]', async ({ page }) => {
  await openPublication(page);
  const downloading = page.waitForEvent('download');
  await page.getByRole('link', { name: /Download the record/ }).click();
  const path = await (await downloading).path();
  const content = readFileSync(path);
  const choose = page.getByLabel(/Check a file of your own/);
  await choose.setInputFiles({ name: 'mine.json', mimeType: 'application/json', buffer: content });
  await expect(page.getByRole('heading', { name: 'Your file mine.json, checked' })).toBeVisible();
  await expect(page.getByText('All 9 checks pass.')).toBeVisible();
  await expect(page.getByText('It is the file that was published')).toBeVisible();
  const bent = content.toString('utf8').replace('"seat":"L01"', '"seat":"L02"');
  await choose.setInputFiles({ name: 'bent.json', mimeType: 'application/json', buffer: Buffer.from(bent) });
  await expect(page.locator('[data-check=answers]')).toContainText('fail');
  await expect(page.getByText(/It is not the file that was published\. Its SHA-256 digest is/)).toBeVisible();
  await choose.setInputFiles({ name: 'notes.txt', mimeType: 'text/plain', buffer: Buffer.from('not a record') });
  await expect(page.locator('[data-check=file]')).toContainText('It is not readable as JSON.');
  await page.getByRole('button', { name: 'Check the published file' }).click();
  await expect(page.getByText('All 9 checks pass.')).toBeVisible();
});

test('a page that cannot fetch the record says so, and verifies nothing [V12]', async ({ page }) => {
  const address = await openPublication(page);
  await page.route('**/p/*/*.json', (route) => route.abort());
  await page.goto(address);
  await expect(page.getByText('The file could not be read.')).toBeVisible();
  await page.unroute('**/p/*/*.json');
  await page.getByRole('button', { name: 'Check again' }).click();
  await expect(page.getByText('All 9 checks pass.')).toBeVisible();
});

test('a manager publishes a closed study, and withdraws it [V5] [V9]', async ({ page, browser }) => {
  await page.goto(`${fairlead.address}/sign-in`);
  await page.getByRole('button', { name: 'Sign in as Maren Oduya' }).click();
  await page.getByRole('link', { name: /Read the report.*Curlew/ }).click();
  await page.waitForURL(/report$/);
  await page.goto(page.url().replace(/\/report$/, ''));
  await page.getByRole('link', { name: 'Publish the result' }).click();
  await page.getByRole('button', { name: 'Publish for good' }).click();
  await expect(page.getByText('10 fields above need a look.')).toBeVisible();
  await expectAccessible(page, 'publish');
  await page.getByLabel('Who paid for the study').fill('The workshop itself.');
  await page.getByLabel('Who supplied the specimens').fill('Taken from stock.');
  await page.getByLabel('Ties of the people to the maker').fill('none');
  for (const box of await page.getByRole('checkbox').all()) await box.check();
  await page.getByRole('button', { name: 'Publish for good' }).click();
  await page.waitForURL(/\/p\/\w{8}$/);
  const address = page.url();
  await expect(page.getByText('All 9 checks pass.')).toBeVisible();
  await expect(page.getByText('The workshop itself.')).toBeVisible();

  await page.goBack();
  await page.waitForURL(/publish$/);
  await page.goto(page.url().replace(/\/publish$/, ''));
  await page.getByRole('button', { name: 'Withdraw the publication' }).click();
  const dialog = page.getByRole('alertdialog');
  await dialog.getByLabel('Why it is withdrawn').fill('The sleeves had slipped.');
  await dialog.getByRole('button', { name: 'Withdraw the publication' }).click();
  await expect(dialog).toBeHidden();
  await expect(page.getByText('It is withdrawn: The sleeves had slipped.')).toBeVisible();

  const stranger = await (await browser.newContext()).newPage();
  await stranger.goto(address);
  await expect(stranger.getByText('The sleeves had slipped.')).toBeVisible();
  await expect(stranger.getByText('Nothing in public: these numbers support no claim.')).toBeVisible();
  await expect(stranger.getByText('All 9 checks pass.')).toBeVisible();
  await expectAccessible(stranger, 'withdrawn');
});
