import { expect, type Page } from '@playwright/test';

/** The link in the newest mail to somebody, read in the mailbox of this machine. */
export async function linkInMailTo(page: Page, address: string, recipient: string, words: RegExp): Promise<string> {
  await page.goto(`${address}/mailbox?q=${encodeURIComponent(recipient)}`);
  await page.getByRole('link', { name: words }).first().click();
  await expect(page.getByRole('heading', { name: words })).toBeVisible();
  const link = page.getByRole('list', { name: 'Links in this mail' }).getByRole('link').first();
  return (await link.getAttribute('href')) ?? '';
}
