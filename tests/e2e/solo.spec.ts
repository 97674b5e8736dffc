import { expect, type Page, test } from '@playwright/test';
import type { Report } from '#shared/contracts/reports.ts';
import { expectAccessible } from './accessible.ts';
import {
  answer,
  beginSession,
  matched,
  openConsole,
  openPhone,
  openSeating,
  present,
  presentTrial,
  signIn,
  takeSeat,
} from './at-the-desk.ts';
import { codeSpecimens, planSession, planStudy, sealStudy } from './plan-a-study.ts';
import { readyStudy } from './ready-study.ts';
import { type RunningFairlead, runFairlead } from './run-fairlead.ts';

// A single listener who asks for A, B and X; and X from separate specimens. One trial each: the sessions are abandoned and
// the studies closed early, which makes the report of what there is.

test.describe.configure({ mode: 'parallel' });

let fairlead: RunningFairlead;
test.beforeAll(async () => {
  fairlead = await runFairlead();
});
test.afterAll(async () => {
  await fairlead?.stop();
});

async function endEarly(desk: Page, manager: Page, studyAddress: string): Promise<Report> {
  const reason = 'Shown what it is to show.';
  await desk.getByRole('button', { name: /^End session/ }).click();
  const dialog = desk.getByRole('alertdialog');
  await dialog.getByRole('textbox').fill(reason);
  await dialog.getByRole('button', { name: /^End/ }).click();
  await desk.getByText('The session was ended early').waitFor();
  const api = studyAddress.replace('/organisations/', '/api/organisations/');
  expect((await manager.request.post(`${api}/close`, { data: { reason } })).ok()).toBe(true);
  await manager.goto(`${studyAddress}/report`);
  await expect(manager.getByRole('heading', { name: 'What you may say' })).toBeVisible();
  return (await manager.request.get(`${api}/report`)).json();
}

/** No more sideways than the phone is wide, with the largest text on the narrowest phone. */
async function expectToFit(phone: Page): Promise<void> {
  const size = phone.viewportSize() ?? { width: 390, height: 844 };
  await phone.setViewportSize({ width: 320, height: 568 });
  await phone.evaluate(() => document.documentElement.style.setProperty('font-size', '200%'));
  expect(await phone.evaluate(() => document.documentElement.scrollWidth)).toBe(320);
  await phone.evaluate(() => document.documentElement.style.removeProperty('font-size'));
  await phone.setViewportSize(size);
}

test('one listener asks for X, A and B and answers, and the report counts what was asked for [S50] [S51] [S56]', async ({
  browser,
}) => {
  const manager = await signIn(browser, fairlead.address, 'Maren Oduya');
  const holder = await signIn(browser, fairlead.address, 'Ines Halloran');
  const studyAddress = await readyStudy(manager, holder, { title: 'Study Ruff', onRequest: { most: 4 } });
  const desk = await signIn(browser, fairlead.address, 'Tomas Brandt');
  await openConsole(desk, 'Study Ruff');
  const phone = await openPhone(browser, fairlead.address, await openSeating(desk));
  await takeSeat(phone, 'Sofa');
  await expect(phone.getByText('In each trial you ask for A, B or X')).toBeVisible();
  await beginSession(desk);

  await desk.getByRole('button', { name: 'Begin trial 1' }).click();
  const codes: string[] = [];
  for (const label of ['X', 'A', 'X', 'B']) {
    await expect(phone.getByRole('button', { name: /^Answer/ })).toHaveCount(0);
    if (label === 'A') {
      await expectAccessible(phone, 'asking');
      await expectToFit(phone);
    }
    await phone.getByRole('button', { name: new RegExp(`^Hear ${label} `) }).click();
    await expect(phone.getByRole('heading', { name: `You asked for ${label}` })).toBeVisible();
    await expect(desk.getByText(new RegExp(`presentation ${codes.length + 1} of at most 4`))).toBeVisible();
    codes.push(await present(desk));
  }
  expect(codes[2]).toBe(codes[0]);
  const heard = codes[0] === codes[1] ? 'A' : 'B';
  await answer(phone, matched(heard));
  await phone.getByText('held by the server').waitFor();
  await desk.getByRole('button', { name: 'Lock trial 1' }).click();

  const report = await endEarly(desk, manager, studyAddress);
  expect(report.record.checks.filter(({ outcome }) => outcome !== 'pass')).toEqual([]);
  expect(report.result).toMatchObject({ answers: 1, correct: 1 });
  await expect(manager.getByText(/Run on request of a single listener: 4.0 presentations/)).toBeVisible();
  await manager.locator('details summary', { hasText: 'of session 1' }).click();
  await expect(manager.getByRole('cell', { name: /A.1, B.1, X.2/ })).toBeVisible();
  await expectAccessible(manager, 'report');
});

test('X from separate specimens, from the plan to a report that calls it fully double-blind [S40] [S41] [S43]', async ({
  browser,
}) => {
  const manager = await signIn(browser, fairlead.address, 'Maren Oduya');
  await planStudy(manager, { title: 'Study Snipe', listeners: 1, answerS: 60, trials: 5, isSeparate: true });
  const studyAddress = manager.url();
  await expect(manager.getByText('from separate specimens: no code comes twice in a trial')).toBeVisible();
  await sealStudy(manager);
  await codeSpecimens(await signIn(browser, fairlead.address, 'Ines Halloran'), studyAddress);
  await planSession(manager, studyAddress);

  const desk = await signIn(browser, fairlead.address, 'Tomas Brandt');
  await openConsole(desk, 'Study Snipe');
  const phone = await openPhone(browser, fairlead.address, await openSeating(desk));
  await takeSeat(phone, 'Sofa');
  await beginSession(desk);
  const codes = await presentTrial(desk, 1);
  expect(new Set(codes).size).toBe(3);
  await answer(phone, matched('A'));
  await phone.getByText('held by the server').waitFor();
  await desk.getByRole('button', { name: 'Lock trial 1' }).click();

  const report = await endEarly(desk, manager, studyAddress);
  expect(report.record.checks.filter(({ outcome }) => outcome !== 'pass')).toEqual([]);
  expect(report.rung.name).toBe('fully double-blind');
  await expect(manager.getByText(/fully double-blind\. The proctor never saw/).first()).toBeVisible();
});
