import { type Browser, expect, type Page } from '@playwright/test';

// What the people in the room do, by hand in their browsers.

export async function signIn(browser: Browser, address: string, name: string): Promise<Page> {
  const context = await browser.newContext({ viewport: { width: 1440, height: 900 } });
  const page = await context.newPage();
  await page.goto(`${address}/sign-in`);
  await page.getByRole('button', { name: `Sign in as ${name}` }).click();
  await page.waitForURL(/organisations/);
  return page;
}

/** Ticks the cautions and opens seating. Returns the session code. */
export async function openSeating(desk: Page): Promise<string> {
  await desk.getByText('Before anybody is seated').waitFor();
  for (const box of await desk.locator('section input[type=checkbox]').all()) await box.check();
  await desk.getByRole('button', { name: 'Confirm the cautions' }).click();
  await desk.getByRole('button', { name: 'Open seating' }).click();
  return (await desk.locator('[data-session-code]').getAttribute('data-session-code')) ?? '';
}

/** Opens the phone's own address; the listener stands before the consent. */
export async function openPhone(browser: Browser, address: string, code: string, height = 844): Promise<Page> {
  const width = height < 700 ? 360 : 390;
  const context = await browser.newContext({ viewport: { width, height }, hasTouch: true });
  const phone = await context.newPage();
  await phone.goto(`${address}/listen/${code}`);
  await phone.getByRole('button', { name: 'Look it up' }).click();
  await phone.getByLabel('I am an adult').check();
  return phone;
}

export async function takeSeat(phone: Page, place: string): Promise<void> {
  await phone.getByLabel('I agree to take part').check();
  await phone.getByLabel(/Where do you sit/).fill(place);
  await phone.getByRole('button', { name: 'Take the seat' }).click();
  await phone.getByText(/You are seated as/).waitFor();
}

/** One presentation: every step of the change, its registered time, the excerpt to its end. */
export async function present(desk: Page): Promise<void> {
  for (const step of ['mute', 'unplug', 'fit', 'check']) await desk.locator(`[data-step=${step}]`).click();
  await expect(desk.locator('[data-step=unmute]')).toBeEnabled();
  await desk.locator('[data-step=unmute]').click();
  await desk.getByText('They are listening').waitFor();
  await desk.getByText('They are listening').waitFor({ state: 'hidden' });
}

/** Fixes the draw and leads through the familiarisation. */
export async function beginSession(desk: Page): Promise<void> {
  await desk.getByRole('button', { name: 'Close seating and fix the draw' }).click();
  await desk.getByRole('button', { name: 'Begin the familiarisation' }).click();
  await present(desk);
  await present(desk);
}

/** A trial up to its question: three presentations in ABX, two in a pair. */
export async function presentTrial(desk: Page, trial: number, presentations = 3): Promise<void> {
  await desk.getByRole('button', { name: `Begin trial ${trial}` }).click();
  for (let count = 0; count < presentations; count += 1) await present(desk);
}

/** Taps an answer and how sure the listener is; on a low phone that is a step of its own. */
export async function answer(phone: Page, choice: string): Promise<void> {
  await phone.getByText(`X was the same as ${choice}`).click();
  if ((phone.viewportSize()?.height ?? 0) < 700)
    await phone.getByRole('button', { name: `${choice}, and how sure?` }).click();
  await phone.getByText('Fairly', { exact: true }).click();
  await phone.getByRole('button', { name: `Send ${choice}` }).click();
}
