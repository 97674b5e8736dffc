import { expect, type Page, test } from '@playwright/test';
import type { KeptPreset } from '#shared/contracts/rig-presets.ts';
import type { RigPreset } from '#shared/protocol/rig-preset.ts';
import { labelText, studyMark } from '#shared/session/label-text.ts';
import { expectAccessible } from './accessible.ts';
import {
  beginSession,
  finishSession,
  openConsole,
  openPhone,
  openSeating,
  present,
  scan,
  signIn,
  takeSeat,
} from './at-the-desk.ts';
import { readyStudy } from './ready-study.ts';
import { type RunningFairlead, runFairlead } from './run-fairlead.ts';

// Every change the same: a preset of the house, labels scanned at both ends, a wrong one, a step taken back, the inventory.

let fairlead: RunningFairlead;
test.beforeAll(async () => {
  fairlead = await runFairlead();
});
test.afterAll(async () => {
  await fairlead.stop();
});

/** Copies the preset that ships for loudspeakers, with a wait that a test can sit through. */
async function copyPreset(manager: Page): Promise<void> {
  await manager.getByRole('link', { name: 'Studies', exact: true }).click();
  await manager.getByRole('link', { name: 'Rig presets' }).click();
  await expect(manager.getByRole('link', { name: 'Line level', exact: true })).toBeVisible();
  await expectAccessible(manager, 'rig presets');
  await manager.getByRole('link', { name: 'Copy Loudspeakers' }).click();
  await manager.getByLabel('Name', { exact: true }).fill('Attic loudspeakers');
  await manager.getByRole('listitem').filter({ hasText: 'Settle' }).getByLabel('Least wait').fill('1');
  await expect(manager.getByText('The waits come to 1')).toBeVisible();
  await expectAccessible(manager, 'rig preset');
  await manager.getByRole('button', { name: 'Save the copy' }).click();
  await expect(manager.getByRole('link', { name: 'Attic loudspeakers', exact: true })).toBeVisible();
}

async function presetNamed(manager: Page, name: string): Promise<RigPreset> {
  const { origin, pathname } = new URL(manager.url());
  const reply = await manager.request.get(`${origin}/api${pathname}?q=${encodeURIComponent(name)}`);
  const { rows }: { rows: KeptPreset[] } = await reply.json();
  const [kept] = rows;
  if (kept === undefined) throw new Error(`no preset named ${name}`);
  return kept.preset;
}

async function voidTrial(desk: Page, trial: number): Promise<void> {
  await desk.getByRole('button', { name: `Begin trial ${trial}` }).click();
  await desk.getByRole('button', { name: 'Void this trial' }).click();
  await desk.getByLabel('Reason').selectOption('noise');
  await desk.getByRole('button', { name: 'Set the trial aside' }).click();
}

test('a session by keyboard and scanner, from its preset to its inventory [S21] [S26] [S27] [S29] [S31]', async ({
  browser,
}) => {
  const manager = await signIn(browser, fairlead.address, 'Maren Oduya');
  await copyPreset(manager);
  const holder = await signIn(browser, fairlead.address, 'Ines Halloran');
  const studyAddress = await readyStudy(manager, holder, {
    method: 'paired-preference',
    spares: 0,
    confidence: false,
    rigPreset: await presetNamed(manager, 'Attic loudspeakers'),
  });

  const desk = await signIn(browser, fairlead.address, 'Tomas Brandt');
  await desk.setViewportSize({ width: 1280, height: 800 });
  await openConsole(desk, 'Study Dunlin');
  const phone = await openPhone(browser, fairlead.address, await openSeating(desk));
  await takeSeat(phone, 'Sofa');
  await beginSession(desk);

  // By keyboard alone: the space bar for what comes next, a scanner for the labels, Alt and a letter for the rest.
  const mark = studyMark(studyAddress.split('/').at(-1) ?? '');
  const at = (words: string) => expect(desk.getByRole('heading', { level: 2, name: words })).toBeVisible();
  await desk.getByRole('button', { name: 'Begin trial 1' }).focus();
  await desk.keyboard.press('Space');
  for (const words of ['Stop and mute', 'Unplug, always', 'Fit']) {
    await at(words);
    // The space bar ignores what comes within 400 ms of the last.
    await expect(async () => {
      await desk.keyboard.press('Space');
      await expect(desk.getByRole('heading', { level: 2, name: words })).toBeHidden({ timeout: 600 });
    }).toPass();
  }
  await at('Scan');
  const code = (await desk.locator('[data-code]').getAttribute('data-code')) ?? '';
  await expectAccessible(desk, 'scan');
  await scan(desk, labelText(mark, '999', 1));
  await expect(desk.getByText(`999 is in hand, and ${code} is wanted`)).toBeVisible();
  await scan(desk, labelText(mark, code, 2));
  await expect(desk.getByText('one end is in')).toBeVisible();
  await scan(desk, labelText(mark, code, 1));
  await at(`Check ${code}`);
  await desk.keyboard.press('Alt+u');
  await at(`Scan ${code}`);
  await desk.keyboard.press('Alt+h');
  await desk.getByLabel('Why is it not scanned?').fill('label torn');
  await desk.getByRole('button', { name: `Both ends read ${code}` }).click();
  await at(`Check ${code}`);
  await present(desk);
  await present(desk);
  await phone.getByText('The first', { exact: true }).click();
  await phone.getByRole('button', { name: 'Send the first' }).click();
  await desk.getByRole('button', { name: 'Lock trial 1' }).click();
  for (let trial = 2; trial <= 5; trial += 1) await voidTrial(desk, trial);

  await at('0 of 2 sleeves');
  await expectAccessible(desk, 'inventory');
  await scan(desk, labelText(mark, '999', 1));
  await expect(desk.getByText('Foreign, set apart: 999')).toBeVisible();
  const codes = await codesOf(holder, studyAddress);
  for (const one of codes) {
    await scan(desk, labelText(mark, one, 1));
    await expect(desk.getByRole('img', { name: `Blind code ${one.split('').join(' ')}` })).toBeVisible();
  }
  await desk.getByRole('button', { name: 'End the inventory' }).click();
  await finishSession(desk);
  await expect(desk.getByText('2 of 2')).toBeVisible();
});

/** The codes as they stand on the labels. */
async function codesOf(holder: Page, studyAddress: string): Promise<string[]> {
  await holder.goto(`${studyAddress}/labels`);
  await holder.getByRole('button', { name: 'I am alone: open the sheet' }).click();
  const labels = holder.getByRole('listitem', { name: /end 1/ });
  await labels.first().waitFor();
  const names = await labels.evaluateAll((items) => items.map((item) => item.getAttribute('aria-label') ?? ''));
  return names.map((name) => name.replace(/\D/g, '').slice(0, 3));
}
