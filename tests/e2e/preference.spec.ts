import { expect, type Page, test } from '@playwright/test';
import type { Report } from '#shared/contracts/reports.ts';
import { answer, beginSession, finishSession, openConsole, openSeating, presentTrial, signIn } from './at-the-desk.ts';
import { linkInMailTo } from './mail-links.ts';
import { closeStudy, codeSpecimens, planSession, planStudy, sealStudy } from './plan-a-study.ts';
import { type RunningFairlead, runFairlead } from './run-fairlead.ts';

// A paired preference in a group of two, from its plan to its report: the listeners are invited by mail, accept by the link
// in it and sit down by the same link.

const listeners = ['oda.brekke@listeners.example', 'silvan.morath@listeners.example'];

let fairlead: RunningFairlead;
test.beforeAll(async () => {
  fairlead = await runFairlead();
});
test.afterAll(async () => {
  await fairlead?.stop();
});

const preference = { id: 'paired-preference', settings: ['Offer “no preference” as an answer'] } as const;

async function prefer(phone: Page, sentence: 'The first' | 'The second' | 'No preference'): Promise<void> {
  await answer(phone, { sentence, short: sentence.toLowerCase(), among: 3 });
  await phone.getByText('held by the server').waitFor();
}

test('a group says which cable it prefers, and the report counts by what came first [F1] [F6]', async ({ browser }) => {
  const manager = await signIn(browser, fairlead.address, 'Maren Oduya');
  await planStudy(manager, { listeners: 2, answerS: 60, trials: 5, method: preference });
  const studyAddress = manager.url();
  await sealStudy(manager);
  await codeSpecimens(await signIn(browser, fairlead.address, 'Ines Halloran'), studyAddress);
  await planSession(manager, studyAddress);

  await manager.getByRole('textbox', { name: 'E-mail addresses' }).fill(listeners.join('\n'));
  await manager.getByRole('button', { name: 'Invite them' }).click();
  await expect(manager.getByText('2 of 2 seats offered: 2 without an answer')).toBeVisible();
  const phones: Page[] = [];
  for (const listener of listeners) {
    const phone = await (await browser.newContext({ viewport: { width: 390, height: 844 }, hasTouch: true })).newPage();
    await phone.goto(await linkInMailTo(phone, fairlead.address, listener, /you are invited to listen/));
    await phone.getByRole('button', { name: 'I come', exact: true }).click();
    await expect(phone.getByRole('heading', { name: 'You come' })).toBeVisible();
    phones.push(phone);
  }

  const desk = await signIn(browser, fairlead.address, 'Tomas Brandt');
  await openConsole(desk, 'Study Dunlin');
  await openSeating(desk);
  const [left, right] = phones as [Page, Page];
  for (const phone of [left, right]) {
    await phone.getByLabel('I am an adult').check();
    await phone.getByLabel('I agree to take part').check();
    await phone.getByRole('button', { name: 'Take the seat' }).click();
    await phone.getByText(/You are seated as/).waitFor();
  }
  await beginSession(desk);
  for (let trial = 1; trial <= 5; trial += 1) {
    await presentTrial(desk, trial, 2);
    await prefer(left, trial % 2 === 0 ? 'The first' : 'The second');
    await prefer(right, trial === 3 ? 'No preference' : 'The first');
    await desk.getByRole('button', { name: `Lock trial ${trial}` }).click();
  }
  await finishSession(desk);

  await closeStudy(manager, studyAddress);
  const report: Report = await (
    await manager.request.get(`${studyAddress.replace('/organisations/', '/api/organisations/')}/report`)
  ).json();
  await expect(manager.getByRole('heading', { level: 1 })).toHaveText(report.finding.headline);
  expect(report.record.checks.filter(({ outcome }) => outcome !== 'pass')).toEqual([]);

  // A trial's truth is the place at which the protocol's first cable was heard.
  const trials = report.sessions[0]?.trials ?? [];
  const forFirst = trials.flatMap(({ truth, answers }) => answers.filter(({ choice }) => choice === truth)).length;
  const answersForOne = 9;
  await expect(manager.getByText(`${Math.max(forFirst, answersForOne - forFirst)} / ${answersForOne}`)).toBeVisible();
  await expect(manager.getByText('no preference, left out').first()).toBeVisible();
});
