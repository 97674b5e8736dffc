import { expect, test } from '@playwright/test';
import { expectAccessible } from './accessible.ts';
import { openSeating, signIn } from './at-the-desk.ts';
import { linkInMailTo } from './mail-links.ts';
import { type RunningFairlead, runFairlead } from './run-fairlead.ts';

// A manager invites by pasting an address; the listener answers on a phone by the link of the mail, and takes the seat by
// the same link once the proctor opens the seating.

let fairlead: RunningFairlead;
test.beforeAll(async () => {
  fairlead = await runFairlead();
});
test.afterAll(async () => {
  await fairlead.stop();
});

const address = 'wilma.tarnowska@listeners.example';

test('an invited listener accepts on a phone and takes the seat by the link [G4] [G5] [G7]', async ({ browser }) => {
  const manager = await signIn(browser, fairlead.address, 'Maren Oduya');
  await manager.getByRole('link', { name: 'Sessions', exact: true }).click();
  await expect(manager.getByRole('heading', { name: 'Sessions' })).toBeVisible();
  await manager.getByRole('link', { name: /Study Heron/ }).click();
  await expect(manager.getByText('2 of 2 seats offered: 1 comes, 1 without an answer, 1 waiting')).toBeVisible();
  await expectAccessible(manager, 'session');
  const addresses = manager.getByRole('textbox', { name: 'E-mail addresses' });
  await addresses.fill(`${address}\nnot an address`);
  await manager.getByRole('button', { name: 'Invite them' }).click();
  await expect(manager.getByText('Line 2: “not an address” is no e-mail address.')).toBeVisible();
  await expect(addresses).toHaveValue(`${address}\nnot an address`);
  await addresses.fill(address);
  await manager.getByRole('button', { name: 'Invite them' }).click();
  const row = manager.getByRole('row', { name: new RegExp(address) });
  await expect(row).toContainText('Waits for a seat, place 2');

  // Two of those before her are withdrawn, and the seat is hers.
  for (const other of ['roos.dekkerma', 'teodor.lindqvaern']) {
    await manager.getByRole('button', { name: new RegExp(`^Change.*${other}`) }).click();
    await manager.getByRole('menuitem', { name: 'Withdraw' }).click();
    await manager.getByRole('alertdialog').getByRole('button', { name: 'Withdraw' }).click();
    await expect(manager.getByRole('alertdialog')).toBeHidden();
  }
  await expect(row).toContainText('No answer yet');

  const phone = await (await browser.newContext({ viewport: { width: 390, height: 844 }, hasTouch: true })).newPage();
  await phone.goto(await linkInMailTo(manager, fairlead.address, address, /a seat is yours/));
  await expect(phone.getByRole('heading', { name: 'A seat is kept for you' })).toBeVisible();
  await expectAccessible(phone, 'an invitation');
  await phone.getByRole('button', { name: 'I come', exact: true }).click();
  await expect(phone.getByRole('heading', { name: 'You come' })).toBeVisible();
  const download = phone.waitForEvent('download');
  await phone.getByRole('button', { name: 'Add to calendar' }).click();
  expect((await download).suggestedFilename()).toBe('session.ics');
  await expectAccessible(phone, 'an accepted invitation');

  const desk = await signIn(browser, fairlead.address, 'Tomas Brandt');
  await desk.getByRole('link', { name: 'Sessions', exact: true }).click();
  await expect(desk.getByRole('heading', { name: 'Sessions' })).toBeVisible();
  await desk.getByRole('link', { name: /Study Heron/ }).click();
  await expect(desk.getByRole('row', { name: new RegExp(address) })).toContainText('Comes');
  await expect(desk.getByRole('button', { name: 'Invite them' })).toHaveCount(0);
  await desk.getByRole('link', { name: 'Go to the console' }).click();
  await openSeating(desk);

  await phone.getByLabel('I am an adult').check();
  await expectAccessible(phone, 'consent by a personal link');
  await phone.getByLabel('I agree to take part').check();
  await phone.getByRole('button', { name: 'Take the seat' }).click();
  await phone.getByText(/You are seated as/).waitFor();

  // The same link on another phone leads to the same seat, and to no second one.
  const again = await (await browser.newContext({ viewport: { width: 390, height: 844 }, hasTouch: true })).newPage();
  await again.goto(await linkInMailTo(manager, fairlead.address, address, /a seat is yours/));
  await again.getByRole('button', { name: 'Back to your seat' }).click();
  await again.getByText(/You are seated as/).waitFor();
  await expect(desk.getByText('1 of 1 here')).toBeVisible();
});
