import { expect, test } from '@playwright/test';
import {
  answer,
  beginSession,
  matched,
  openConsole,
  openPhone,
  openSeating,
  presentTrial,
  signIn,
  takeSeat,
} from './at-the-desk.ts';
import { type DeadNetwork, deadNetwork } from './dead-network.ts';
import { readyStudy } from './ready-study.ts';
import { type RunningFairlead, runFairlead } from './run-fairlead.ts';

// The network of the room goes dead for two minutes, without a word to anybody, while a trial is open.

let fairlead: RunningFairlead;
let network: DeadNetwork;
test.beforeAll(async () => {
  fairlead = await runFairlead();
  network = await deadNetwork(fairlead.address);
});
test.afterAll(async () => {
  await network?.stop();
  await fairlead?.stop();
});

test('console and phone come back where they were after two minutes without a network [S13]', async ({ browser }) => {
  const manager = await signIn(browser, fairlead.address, 'Maren Oduya');
  await readyStudy(manager, await signIn(browser, fairlead.address, 'Ines Halloran'), { answerS: 300 });

  const desk = await signIn(browser, network.address, 'Tomas Brandt');
  await openConsole(desk, 'Study Dunlin');
  const code = await openSeating(desk);
  const phone = await openPhone(browser, network.address, code);
  await takeSeat(phone, 'Left');
  await beginSession(desk);
  await presentTrial(desk, 1);

  network.cut();
  const cutAt = Date.now();
  await answer(phone, matched('A'));
  await expect(phone.getByText('still on this phone')).toBeVisible();
  await expect(phone.getByText(/No connection/).first()).toBeVisible({ timeout: 30_000 });
  await expect(desk.getByText(/No connection/).first()).toBeVisible({ timeout: 30_000 });
  await phone.waitForTimeout(Math.max(0, cutAt + 120_000 - Date.now()));
  await expect(phone.getByText('still on this phone')).toBeVisible();
  network.mend();

  await expect(phone.getByText('A, held by the server')).toBeVisible({ timeout: 30_000 });
  await desk.getByRole('button', { name: 'Lock trial 1' }).click({ timeout: 30_000 });
  await expect(desk.getByRole('button', { name: 'Begin trial 2' })).toBeVisible();
});
