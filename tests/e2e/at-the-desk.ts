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

/** Opens the console of a study's session from the proctor's home; it stands before the cautions. */
export async function openConsole(desk: Page, title: string): Promise<void> {
  await desk
    .getByRole('link', { name: new RegExp(title) })
    .first()
    .click();
  await desk.getByText('Before anybody is seated').waitFor();
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

/** Where the session stands: trial, presentation and stage in one mark; null between trials. */
const standOf = (desk: Page): Promise<string | null> =>
  desk.evaluate(() => document.querySelector('[data-stand]')?.getAttribute('data-stand') ?? null);

/** What a keyboard scanner does, wherever the focus is. */
export async function scan(desk: Page, text: string): Promise<void> {
  await desk.keyboard.type(text);
  await desk.keyboard.press('Enter');
}

/** Presses the step at hand, if its time has come; at the scan holds up a label. */
async function goOn(desk: Page, code: string): Promise<void> {
  if ((await desk.locator('[data-scan-field]').count()) > 0) return scan(desk, code);
  const step = desk.locator('[data-next-act][data-step]');
  if (await step.isEnabled({ timeout: 2_000 })) await step.click({ timeout: 2_000 });
}

/**
 * One presentation: every step of the change, its registered time, the excerpt to its end. Returns the code fitted. A start
 * that came too late for its registered length is pressed again at the next.
 */
export async function present(desk: Page): Promise<string> {
  await expect(desk.locator('[data-stand]')).toHaveAttribute('data-stand', / change$/);
  const change = await standOf(desk);
  const code = (await desk.locator('[data-code]').getAttribute('data-code')) ?? '';
  await expect(async () => {
    if ((await standOf(desk)) === change) await goOn(desk, code);
    expect(await standOf(desk)).not.toBe(change);
  }).toPass({ timeout: 120_000, intervals: [50] });
  await expect.poll(() => standOf(desk), { timeout: 60_000 }).not.toBe(change?.replace('change', 'listening'));
  return code;
}

/** Fixes the draw and leads through the familiarisation. */
export async function beginSession(desk: Page): Promise<void> {
  await desk.getByRole('button', { name: 'Close seating and fix the draw' }).click();
  await desk.getByRole('button', { name: 'Begin the familiarisation' }).click();
  await present(desk);
  await present(desk);
}

/** A trial up to its question: three presentations in ABX, two in a pair. Returns the codes fitted, in order. */
export async function presentTrial(desk: Page, trial: number, presentations = 3): Promise<string[]> {
  await desk.getByRole('button', { name: `Begin trial ${trial}` }).click();
  const codes: string[] = [];
  while (codes.length < presentations) codes.push(await present(desk));
  return codes;
}

export async function finishSession(desk: Page): Promise<void> {
  await desk.getByRole('button', { name: 'Finish the session' }).click();
  await desk.getByText('The session is finished').waitFor();
}

/** An answer as the phone words it, among how many. */
export type Choice = { sentence: string; short: string; among: number };

/** What ABX asks. */
export const matched = (label: string): Choice => ({ sentence: `X was the same as ${label}`, short: label, among: 2 });

/** Taps an answer and how sure the listener is; on a low phone, or a middling one with more answers, a step of its own. */
export async function answer(phone: Page, { sentence, short, among }: Choice): Promise<void> {
  await phone.getByText(sentence, { exact: true }).click();
  if ((phone.viewportSize()?.height ?? 0) < (among > 2 ? 920 : 700))
    await phone.getByRole('button', { name: new RegExp(`^${short}, and how sure\\?$`, 'i') }).click();
  await phone.getByText('Fairly', { exact: true }).click();
  await phone.getByRole('button', { name: `Send ${short}` }).click();
}
