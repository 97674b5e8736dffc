import { expect, type Page, test } from '@playwright/test';
import type { Report } from '#shared/contracts/reports.ts';
import { beginSession, openPhone, openSeating, presentTrial, signIn, takeSeat } from './at-the-desk.ts';
import { codeSpecimens, planSession, planStudy } from './plan-a-study.ts';
import { type RunningFairlead, runFairlead } from './run-fairlead.ts';

// A paired preference in a group of two, from its plan to its report.

let fairlead: RunningFairlead;
test.beforeAll(async () => {
  fairlead = await runFairlead();
});
test.afterAll(async () => {
  await fairlead?.stop();
});

async function prefer(phone: Page, what: 'The first' | 'The second' | 'No preference'): Promise<void> {
  await phone.getByText(what, { exact: true }).click();
  await phone.getByRole('button', { name: /how sure/ }).click();
  await phone.getByText('Fairly', { exact: true }).click();
  await phone.getByRole('button', { name: /^Send/ }).click();
  await phone.getByText('held by the server').waitFor();
}

test('a group says which cable it prefers, and the report counts by what came first [F1] [F6]', async ({ browser }) => {
  const manager = await signIn(browser, fairlead.address, 'Maren Oduya');
  await planStudy(manager, { listeners: 2, answerS: 60, trials: 5, preference: true });
  const studyAddress = manager.url();
  await manager.getByRole('button', { name: /^Seal/ }).first().click();
  await manager.getByRole('alertdialog').getByRole('button', { name: /^Seal/ }).click();
  await expect(manager.getByRole('alertdialog')).toBeHidden();
  await codeSpecimens(await signIn(browser, fairlead.address, 'Ines Halloran'), studyAddress);
  await planSession(manager, studyAddress);

  const desk = await signIn(browser, fairlead.address, 'Tomas Brandt');
  await desk
    .getByRole('link', { name: /Study Dunlin/ })
    .first()
    .click();
  const code = await openSeating(desk);
  const phones = [await openPhone(browser, fairlead.address, code), await openPhone(browser, fairlead.address, code)];
  const [left, right] = phones as [Page, Page];
  await takeSeat(left, 'Left');
  await takeSeat(right, 'Right');
  await beginSession(desk);
  for (let trial = 1; trial <= 5; trial += 1) {
    await presentTrial(desk, trial, 2);
    await prefer(left, trial % 2 === 0 ? 'The first' : 'The second');
    await prefer(right, trial === 3 ? 'No preference' : 'The first');
    await desk.getByRole('button', { name: `Lock trial ${trial}` }).click();
  }
  await desk.getByRole('button', { name: 'Finish the session' }).click();
  await desk.getByText('The session is finished').waitFor();

  await manager.goto(studyAddress);
  await manager
    .getByRole('button', { name: /^Close/ })
    .first()
    .click();
  await manager
    .getByRole('alertdialog')
    .getByRole('button', { name: /^Close/ })
    .click();
  await expect(manager.getByRole('alertdialog')).toBeHidden();
  await manager.goto(`${studyAddress}/report`);
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
  await expect(
    manager
      .getByText(/1 .*no preference/i)
      .filter({ visible: true })
      .first(),
  ).toBeVisible();
});
