import AxeBuilder from '@axe-core/playwright';
import { expect, type Page } from '@playwright/test';

/** Nothing that axe calls serious or critical on the page as it stands once its heading is there. */
export async function expectAccessible(page: Page, what: string): Promise<void> {
  await expect(page.locator('h1').first()).toBeAttached();
  const { violations } = await new AxeBuilder({ page }).analyze();
  expect(violations.map(({ id, nodes }) => `${what}: ${id} at ${nodes[0]?.target.join(' ')}`)).toEqual([]);
}
