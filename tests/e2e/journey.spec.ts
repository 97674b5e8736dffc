import { execFileSync } from 'node:child_process';
import { expect, type Page, test } from '@playwright/test';
import type { Report } from '#shared/contracts/reports.ts';
import { expectAccessible } from './accessible.ts';
import {
  answer,
  beginSession,
  finishSession,
  matched,
  openConsole,
  openPhone,
  openSeating,
  presentTrial,
  signIn,
  takeSeat,
} from './at-the-desk.ts';
import { closeStudy, codeSpecimens, planSession, planStudy, sealStudy } from './plan-a-study.ts';
import { type RunningFairlead, runFairlead } from './run-fairlead.ts';

// A proctor and three phones at once: plan, seal, code, seat, five trials with one void, its spare and one phone offline in
// the middle, close, report. The figures are compared with what R makes of the same answers.

let fairlead: RunningFairlead;
test.beforeAll(async () => {
  fairlead = await runFairlead();
});
test.afterAll(async () => {
  await fairlead.stop();
});

/** What R makes of the answers: the exact convolution over the draws, answers held fixed, and binom.test per listener. */
function fromR(trials: { truth: string; choices: (string | null)[] }[]): {
  correct: number;
  p: number;
  listenerP: number[];
} {
  const listeners = trials[0]?.choices.length ?? 0;
  const lines = trials.map(({ truth, choices }) => {
    const count = (label: string) => choices.filter((choice) => choice === label).length;
    return `c(${count('A')},${count('B')},${truth === 'A' ? 1 : 2})`;
  });
  const right = Array.from(
    { length: listeners },
    (_, index) => trials.filter(({ truth, choices }) => choices[index] === truth).length,
  );
  const script = `
    trials <- list(${lines.join(',')})
    dist <- c(1); observed <- 0
    for (t in trials) {
      next_dist <- numeric(length(dist) + max(t[1:2]))
      for (label in 1:2) { k <- t[label]; next_dist[k + seq_along(dist)] <- next_dist[k + seq_along(dist)] + dist / 2 }
      dist <- next_dist; observed <- observed + t[t[3]]
    }
    p <- sum(dist[(observed + 1):length(dist)])
    per <- sapply(c(${right.join(',')}), function(k) binom.test(k, ${trials.length}, alternative = "greater")$p.value)
    cat(sprintf("%.15g", c(observed, p, per)), sep = " ")
  `;
  const [correct = Number.NaN, p = Number.NaN, ...listenerP] = execFileSync('Rscript', ['-e', script], {
    encoding: 'utf8',
  })
    .trim()
    .split(' ')
    .map(Number);
  return { correct, p, listenerP };
}

test('a study from its plan to a report that R agrees with [R1] [S1] [S13]', async ({ browser }) => {
  const manager = await signIn(browser, fairlead.address, 'Maren Oduya');
  await planStudy(manager, { listeners: 3, answerS: 60, trials: 5 });
  await expectAccessible(manager, 'draft');
  const studyAddress = manager.url();
  await sealStudy(manager);

  const holder = await signIn(browser, fairlead.address, 'Ines Halloran');
  await codeSpecimens(holder, studyAddress);
  await expectAccessible(holder, 'codes');

  await planSession(manager, studyAddress);

  const desk = await signIn(browser, fairlead.address, 'Tomas Brandt');
  await openConsole(desk, 'Study Dunlin');
  await expectAccessible(desk, 'cautions');
  const code = await openSeating(desk);
  await expectAccessible(desk, 'seating');

  const phones: Page[] = [];
  // The third phone is a small one: there, how sure the listener is has a step of its own.
  for (const [place, height] of [
    ['Left', 844],
    ['Middle', 844],
    ['Right', 640],
  ] as const) {
    const phone = await openPhone(browser, fairlead.address, code, height);
    if (phones.length === 0) await expectAccessible(phone, 'consent');
    await takeSeat(phone, place);
    phones.push(phone);
  }
  const [first, second, third] = phones as [Page, Page, Page];

  await beginSession(desk);

  const pattern = ['A', 'B', 'B', 'A', 'B', 'A'];
  for (let trial = 1; trial <= 6; trial += 1) {
    await presentTrial(desk, trial);
    const choice = pattern[trial - 1] ?? 'A';
    if (trial === 2) {
      await desk.getByRole('button', { name: 'Void this trial' }).click();
      await desk.getByLabel('Reason').selectOption('noise');
      await desk.getByRole('button', { name: 'Set the trial aside' }).click();
      await first.getByText('Trial 2 was set aside').waitFor();
      continue;
    }
    await answer(first, matched(choice));
    await first.getByText('held by the server').waitFor();
    await answer(third, matched(choice === 'A' ? 'B' : 'A'));
    if (trial === 4) {
      // The second phone loses the network, is tapped all the same, and comes back within the window.
      await second.context().setOffline(true);
      await desk.getByText('away').waitFor();
      await answer(second, matched(choice));
      await expect(second.getByText('still on this phone')).toBeVisible();
      await second.context().setOffline(false);
      await expect(second.getByText('held by the server')).toBeVisible({ timeout: 20_000 });
    } else {
      await answer(second, matched(choice));
    }
    if (trial === 5) {
      // A phone that is reloaded comes back to where it was.
      await second.getByText('held by the server').waitFor();
      await second.reload();
      await expect(second.getByText(`${choice}, held by the server`)).toBeVisible();
      await expectAccessible(second, 'held');
    }
    await desk.getByRole('button', { name: `Lock trial ${trial}` }).click();
  }
  await finishSession(desk);
  await first.getByText('Your receipts').waitFor();
  await expect(first.locator('ol > li')).toHaveCount(5);

  await closeStudy(manager, studyAddress);
  await expectAccessible(manager, 'report');

  const apiAddress = studyAddress.replace('/organisations/', '/api/organisations/');
  const report: Report = await (await manager.request.get(`${apiAddress}/report`)).json();
  expect(report.record.checks.filter(({ outcome }) => outcome !== 'pass')).toEqual([]);
  const locked = (report.sessions[0]?.trials ?? []).filter(({ outcome }) => outcome === 'locked');
  expect(locked.map(({ trial }) => trial)).toEqual([1, 3, 4, 5, 6]);
  expect(locked.map(({ answers }) => answers[0]?.choice)).toEqual(pattern.filter((_, index) => index !== 1));
  const r = fromR(locked.map(({ truth, answers }) => ({ truth, choices: answers.map(({ choice }) => choice) })));
  expect(report.result.correct).toBe(r.correct);
  expect(Number(report.result.p.value)).toBeCloseTo(r.p, 11);
  expect(report.result.byListener.map(({ p }) => Number(p).toFixed(10))).toEqual(r.listenerP.map((p) => p.toFixed(10)));
  await expect(manager.getByText(`${r.correct} / 15`)).toBeVisible();
});
