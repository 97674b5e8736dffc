import { expect, type Page, test } from '@playwright/test';
import { expectAccessible } from './accessible.ts';
import { beginSession, openConsole, openPhone, openSeating, presentTrial, signIn, takeSeat } from './at-the-desk.ts';
import { readyStudy } from './ready-study.ts';
import { type RunningFairlead, runFairlead } from './run-fairlead.ts';

// What is measured of the room: levels at the load that keep a session from starting, and levels that the finding names.

let fairlead: RunningFairlead;
test.beforeAll(async () => {
  fairlead = await runFairlead();
});
test.afterAll(async () => {
  await fairlead?.stop();
});

const frequenciesHz = [1000];

/** Pastes a table of voltages, one a code, as a spreadsheet gives them. */
async function enterLevels(page: Page, volts: (index: number) => string): Promise<void> {
  const codes = await page.locator('tbody th').allInnerTexts();
  const distinct = [...new Set(codes.map((text) => text.slice(0, 3)).filter((code) => /^\d{3}$/.test(code)))];
  const lines = distinct.flatMap((code, index) =>
    ['left', 'right'].map((channel) => [code, channel, ...[1, 2, 3].map(() => volts(index))].join('\t')),
  );
  const paste = page.getByText('Paste a table, or open a file');
  if (!(await page.getByLabel('Table', { exact: true }).isVisible())) await paste.click();
  await page.getByLabel('Table', { exact: true }).fill(lines.join('\n'));
  await page.getByRole('button', { name: 'Fill in the readings' }).click();
  await expect(page.getByText(`${lines.length} lines filled in`)).toBeVisible();
}

async function describeInstrument(page: Page): Promise<void> {
  await page.getByLabel('Instrument').fill('Bench voltmeter');
  await page.getByLabel('Reads true up to').fill('100 kHz');
  await page.getByLabel(/Calibrated on/).fill('2026-05-11');
}

const record = (page: Page) => page.getByRole('button', { name: 'Put it on the record' });
const toLevels = async (holder: Page, title: string) => {
  await holder.getByRole('link', { name: new RegExp(`^Measure the levels.*${title}`) }).click();
  await expect(holder.getByRole('heading', { level: 1 })).toHaveText('Levels at the load');
};

test('a level-compensated session waits for levels within 0.2 dB, and nothing typed is lost [S60] [S64]', async ({
  browser,
}) => {
  const manager = await signIn(browser, fairlead.address, 'Maren Oduya');
  const holder = await signIn(browser, fairlead.address, 'Ines Halloran');
  const levels = { handling: 'level-compensated', toleranceMilliDb: 100, frequenciesHz } as const;
  await readyStudy(manager, holder, { title: 'Study Godwit', levels });
  await holder.reload();
  await toLevels(holder, 'Study Godwit');

  const [first] = await holder.getByLabel(/reading 1$/).all();
  if (first === undefined) throw new Error('no reading to type');
  await first.fill('2000');
  await expect(holder.getByText('2000 is more than 200 V.')).toBeVisible();
  await record(holder).click();
  await expect(holder.getByText('Nothing is saved yet.')).toBeVisible();
  await expect(first).toHaveValue('2000');
  await expectAccessible(holder, 'levels with faults');

  await describeInstrument(holder);
  await enterLevels(holder, (index) => (index === 0 ? '2,000' : '2,060'));
  await expect(holder.getByText('beyond 0.2 dB')).toBeVisible();
  await record(holder).click();
  await expect(holder.getByText('The session cannot start yet.')).toBeVisible();

  const desk = await signIn(browser, fairlead.address, 'Tomas Brandt');
  await openConsole(desk, 'Study Godwit');
  for (const box of await desk.locator('section input[type=checkbox]').all()) await box.check();
  await desk.getByRole('button', { name: 'Confirm the cautions' }).click();
  await expect(desk.getByText('The levels are out by more than 0.2 dB')).toBeVisible();
  await expect(desk.getByText('Waiting for the levels')).toBeVisible();
  await expect(desk.getByRole('button', { name: 'Open seating' })).toBeHidden();

  await enterLevels(holder, (index) => (index === 0 ? '2,000' : '2,005'));
  await record(holder).click();
  await expect(desk.getByRole('button', { name: 'Open seating' })).toBeVisible();
  await expect(desk.locator('body')).not.toContainText(/2[.,]0|dBV|0\.0\d dB/);
});

test('the finding names a level that differs as supplied [S69]', async ({ browser }) => {
  const manager = await signIn(browser, fairlead.address, 'Maren Oduya');
  const holder = await signIn(browser, fairlead.address, 'Ines Halloran');
  const levels = { handling: 'as-supplied', toleranceMilliDb: 100, frequenciesHz } as const;
  const study = await readyStudy(manager, holder, { title: 'Study Avocet', method: 'paired-preference', levels });
  await holder.reload();
  await toLevels(holder, 'Study Avocet');
  await describeInstrument(holder);
  await enterLevels(holder, (index) => (index === 0 ? '2.000' : '2.120'));
  await record(holder).click();
  await expect(holder.getByText('Largest difference at 1 kHz').first()).toBeVisible();

  const desk = await signIn(browser, fairlead.address, 'Tomas Brandt');
  await openConsole(desk, 'Study Avocet');
  const phone = await openPhone(browser, fairlead.address, await openSeating(desk));
  await takeSeat(phone, 'Sofa');
  await beginSession(desk);
  await presentTrial(desk, 1, 2);
  await phone.getByText('The first', { exact: true }).click();
  await phone.getByText('Fairly', { exact: true }).click();
  await phone.getByRole('button', { name: /^Send/ }).click();
  await desk.getByRole('button', { name: 'Lock trial 1' }).click();
  await desk.getByRole('button', { name: 'End session' }).click();
  await desk.getByLabel('Why does it end here?').fill('One trial is enough to read the level.');
  await desk.getByRole('alertdialog').getByRole('button', { name: 'End the session' }).click();
  await desk.getByText('The session was ended early').waitFor();

  const { origin, pathname } = new URL(study);
  const closed = await manager.request.post(`${origin}/api${pathname}/close`, { data: { reason: 'Enough was seen.' } });
  expect(closed.ok()).toBe(true);
  await manager.goto(`${study}/report`);
  await expect(
    manager.getByText(
      'The cables, as supplied, differed by 0.51 dB in level at the load; loudness may explain the result.',
    ),
  ).toBeVisible();
  await expect(manager.getByRole('heading', { name: 'Level at the load' })).toBeVisible();
  await expectAccessible(manager, 'the report');
});
