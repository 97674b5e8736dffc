import { readFileSync } from 'node:fs';
import { expect, type Page, test } from '@playwright/test';
import { isZip, readZip, writeZip } from '#shared/bundle/zip.ts';
import type { ListenerView } from '#shared/contracts/listener-live.ts';
import type { Entry } from '#shared/ledger/chain.ts';
import { bundleCheckNames, recordCheckNames } from '#shared/ledger/check-names.ts';
import type { Check } from '#shared/ledger/verify.ts';
import type { PayloadOf } from '#shared/session/events.ts';
import { receiptsText } from '../../src/listener/receipts-text.ts';
import { bentBundles, wholeBundle } from '../support/bent-bundles.ts';
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
      lines.map((line) => `${line.getAttribute('data-check')} ${line.getAttribute('data-outcome')}`),
    );

// The demo's tokens are of the day on which it was made, later than its simulated trials.
const timed = ['sealingTime', 'drawTime'];
const untouched = bundleCheckNames.map(({ id }) => `${id} ${timed.includes(id) ? 'not checkable' : 'pass'}`);
const nothingFails = (page: Page) =>
  page.getByText(`No check fails; ${untouched.length - timed.length} of ${untouched.length} pass.`);

/** The bundle of the publication that is open, unpacked. */
async function downloadedBundle(page: Page): Promise<{ zip: Buffer; files: Map<string, Uint8Array> }> {
  const zip = await (await page.request.get(`${page.url()}/bundle.zip`)).body();
  const read = readZip(zip);
  if ('fault' in read) throw new Error(read.fault);
  return { zip, files: new Map(read.files) };
}

function raise(words: string): never {
  throw new Error(words);
}

const archive = (name: string, buffer: Uint8Array) => ({
  name,
  mimeType: 'application/zip',
  buffer: Buffer.from(buffer),
});

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
  await expect(nothingFails(page)).toBeVisible();
  await expect(page.getByText('It is the document that was published')).toBeVisible();
  await expect(page.locator('[data-check=sealingTime]')).toContainText('the token came too late to show');
  expect(await outcomes(page)).toEqual(untouched);
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
  const { files } = await downloadedBundle(page);
  const whole = new TextDecoder().decode(files.get('study.json'));
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
      check: 'codeKey',
      pattern: /"secrets":\{"codeKey":\{"rows":\[\{"cable":0,"code":"\d\d(\d)/,
      put: (was: string) => (was === '0' ? '1' : '0'),
    },
    {
      check: 'figures',
      pattern:
        /"result":\{"alpha":"0.05","alternative":"greater","amongListeners":\{"aboutChance":\{"degreesOfFreedom":(\d)/,
      put: (was: string) => String((Number(was) + 1) % 10),
      last: true,
    },
  ];
  for (const { check, pattern, put, last } of alterations) {
    const found = [...whole.matchAll(new RegExp(pattern, 'gd'))];
    const match = last === true ? found.at(-1) : found[0];
    const [at = 0] = match?.indices?.[1] ?? [];
    expect(at, check).toBeGreaterThan(0);
    const altered = whole.slice(0, at) + put(whole.charAt(at)) + whole.slice(at + 1);
    const body = Buffer.from(writeZip(new Map([...files, ['study.json', Buffer.from(altered)]])));
    await page.route('**/p/*/bundle.zip', (route) => route.fulfill({ contentType: 'application/zip', body }));
    await page.goto(address);
    await expect(page.getByText(/This file does not hold/)).toBeVisible();
    // Whatever is altered is no more the document whose digest the record names, and the record cannot be read on to it.
    const failed = (await outcomes(page)).filter((line) => line.endsWith(' fail'));
    expect(failed).toEqual(expect.arrayContaining([`${check} fail`]));
    expect(failed.filter((line) => !['published fail', `${check} fail`].includes(line))).toEqual([]);
    await expect(page.getByText('it was altered on its way to you')).toBeVisible();
    if (check === 'answers') await expectAccessible(page, 'altered');
    await page.unroute('**/p/*/bundle.zip');
  }
});

test('a visitor downloads the bundle and checks a file of their own [V12]', async ({ page }) => {
  await openPublication(page);
  const downloading = page.waitForEvent('download');
  await page.getByRole('link', { name: 'Download the bundle' }).click();
  const content = readFileSync(await (await downloading).path());
  const choose = page.getByLabel(/Check a file of your own/);
  await choose.setInputFiles(archive('mine.zip', content));
  await expect(page.getByRole('heading', { name: 'Your file mine.zip, checked' })).toBeVisible();
  await expect(nothingFails(page)).toBeVisible();
  await expect(page.getByText('It is the document that was published')).toBeVisible();

  const { files } = await downloadedBundle(page);
  const record = Buffer.from(files.get('study.json') ?? '');
  await choose.setInputFiles({ name: 'record.json', mimeType: 'application/json', buffer: record });
  await expect(page.getByText(`All ${recordCheckNames.length} checks pass.`)).toBeVisible();
  expect(await outcomes(page)).toEqual(recordCheckNames.map(({ id }) => `${id} pass`));
  await expect(page.getByText('It is the document that was published')).toBeVisible();

  const bent = record.toString('utf8').replace('"seat":"L01"', '"seat":"L02"');
  await choose.setInputFiles({ name: 'bent.json', mimeType: 'application/json', buffer: Buffer.from(bent) });
  await expect(page.locator('[data-check=answers]')).toContainText('fail');
  await expect(page.getByText(/It is not the document that was published\. Its SHA-256 digest is/)).toBeVisible();
  await choose.setInputFiles({ name: 'notes.txt', mimeType: 'text/plain', buffer: Buffer.from('not a record') });
  await expect(page.locator('[data-check=file]')).toContainText('It is not readable as JSON.');
  await page.getByRole('button', { name: 'Check the published file' }).click();
  await expect(nothingFails(page)).toBeVisible();
});

test('a page that cannot fetch the bundle says so, and verifies nothing [V12]', async ({ page }) => {
  const address = await openPublication(page);
  await page.route('**/p/*/bundle.zip', (route) => route.abort());
  await page.goto(address);
  await expect(page.getByText('The file could not be read.')).toBeVisible();
  await expect(page.getByText('A record has to be checked first.')).toBeVisible();
  await page.unroute('**/p/*/bundle.zip');
  await page.getByRole('button', { name: 'Check again' }).click();
  await expect(nothingFails(page)).toBeVisible();
});

/** The worker that the page itself runs, started by its address and given one file after the other. */
const inWorker = (page: Page, worker: string, files: readonly string[]): Promise<Check[][]> =>
  page.evaluate(
    async ([address, encoded]) => {
      const own = new Worker(address, { type: 'module' });
      const said: Check[][] = [];
      for (const text of encoded) {
        const checks: Check[] = [];
        await new Promise<void>((resolve, reject) => {
          own.onerror = () => reject(new Error('the worker broke'));
          own.onmessage = ({ data }) => {
            if ('check' in data) checks.push(data.check);
            if ('done' in data) resolve();
          };
          own.postMessage({ file: Uint8Array.from(atob(text), (character) => character.charCodeAt(0)).buffer });
        });
        said.push(checks);
      }
      own.terminate();
      return said;
    },
    [worker, files] as const,
  );

test('every bent bundle fails at its line in the browser, and an untouched one passes [Z2] [Z5]', async ({ page }) => {
  await page.goto(`${fairlead.address}/p`);
  await page.getByRole('link', { name: 'Check it in your browser' }).click();
  await expect(page.getByText('No file is chosen yet.')).toBeVisible();
  await expectAccessible(page, 'verify');
  const sent: string[] = [];
  page.on('request', (request) => sent.push(`${request.method()} ${new URL(request.url()).pathname}`));
  const choose = page.getByLabel(/Check a file of your own/);
  const whole = await wholeBundle();
  await choose.setInputFiles(archive('whole.zip', whole.zip));
  await expect(page.getByRole('heading', { name: 'whole.zip, checked in your browser' })).toBeVisible();
  await expect(page.getByText(`All ${bundleCheckNames.length} checks pass.`)).toBeVisible();
  expect(await outcomes(page)).toEqual(bundleCheckNames.map(({ id }) => `${id} pass`));

  const bytes: Uint8Array[] = [];
  for (const bent of bentBundles) bytes.push(await bent.bend(whole));
  const worker = page.workers()[0]?.url() ?? '';
  const encoded = bytes.map((one) => Buffer.from(one).toString('base64'));
  for (const [index, checks] of (await inWorker(page, worker, encoded)).entries()) {
    const { name, line, says, outcome = 'fail' } = bentBundles[index] ?? raise('no such bundle');
    const check = checks.find(({ id }) => id === line);
    expect(check?.outcome, `${name}: ${check?.reason}`).toBe(outcome);
    // What is no archive is read as a record, and refused in other words.
    if (isZip(bytes[index] ?? new Uint8Array())) expect(check?.reason, name).toMatch(says);
  }

  // And some through the page itself.
  for (const id of ['file', 'record', 'answers', 'figures', 'tables']) {
    const index = bentBundles.findIndex(({ line, outcome }) => line === id && outcome === undefined);
    const { name, says } = bentBundles[index] ?? raise('no such bundle');
    await choose.setInputFiles(archive(`${id}.zip`, bytes[index] ?? new Uint8Array()));
    await expect(page.getByRole('heading', { name: `${id}.zip, checked in your browser` })).toBeVisible();
    await expect(page.getByText(/supports no conclusion/)).toBeVisible();
    await expect(page.locator(`[data-check=${id}]`), name).toHaveAttribute('data-outcome', 'fail');
    if (id !== 'file') await expect(page.locator(`[data-check=${id}]`), name).toContainText(says);
  }
  await expectAccessible(page, 'bent');
  expect(sent.filter((request) => !/^GET \/assets\//.test(request))).toEqual([]);
});

test('a listener looks receipts up in the record that was checked, by keyboard [V14]', async ({ page }) => {
  await openPublication(page);
  const { zip, files } = await downloadedBundle(page);
  const { record } = JSON.parse(new TextDecoder().decode(files.get('study.json'))) as { record: Entry[] };
  const locks = record.filter(({ kind, payload }) => kind === 'trial-locked' && payload.session === 1).slice(0, 3);
  const leafIn = ({ payload }: Entry) => (payload as unknown as PayloadOf<'trial-locked'>).leaves[0];
  const kept = locks.map((lock) => ({
    trial: Number(lock.payload.trial),
    leaf: leafIn(lock)?.leaf ?? '',
    sequence: lock.sequence,
    digest: lock.digest,
    isOwn: true,
  }));
  const [seat = ''] = locks.map((lock) => leafIn(lock)?.seat);
  const text = receiptsText({ title: 'Study', session: 1, seat } as ListenerView, { receipts: kept, disputed: [] });

  const lookUp = async (words: string) => {
    await page.getByRole('textbox', { name: 'Receipts' }).fill(words);
    await page.keyboard.press('Tab');
    await page.keyboard.press('Enter');
  };
  await expect(nothingFails(page)).toBeVisible();
  await page.getByRole('button', { name: 'Look them up' }).click();
  await expect(page.getByText('Paste the text that the phone copied.')).toBeVisible();
  await lookUp(text);
  await expect(page.getByText('All 3 are on this record.')).toBeVisible();

  await page.goto(`${fairlead.address}/verify`);
  await expect(page.getByText('A record has to be checked first.')).toBeVisible();
  await page.getByLabel(/Check a file of your own/).setInputFiles(archive('mine.zip', zip));
  await expect(nothingFails(page)).toBeVisible();
  await lookUp(text.replace(kept[1]?.leaf ?? '', 'f'.repeat(64)));
  await expect(page.getByText('2 of 3 are on this record.')).toBeVisible();
  await expect(page.getByText(`Entry ${kept[1]?.sequence} does not hold this leaf`)).toBeVisible();
  await lookUp('nothing of the kind');
  await expect(page.getByText('There is no receipt in this text.')).toBeVisible();
  await expectAccessible(page, 'receipts');
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
  await expect(nothingFails(page)).toBeVisible();
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
  await expect(nothingFails(stranger)).toBeVisible();
  await expect(stranger.locator('[data-check=published]')).toContainText('was withdrawn: The sleeves had slipped.');
  await expectAccessible(stranger, 'withdrawn');
});
