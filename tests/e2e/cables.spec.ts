import { expect, type Page, test } from '@playwright/test';
import { expectAccessible } from './accessible.ts';
import { signIn } from './at-the-desk.ts';
import { type RunningFairlead, runFairlead } from './run-fairlead.ts';

// A manager describes two cables, brings a measurement with a broken line, and plans a study of the two.

let fairlead: RunningFairlead;
test.beforeAll(async () => {
  fairlead = await runFairlead();
});
test.afterAll(async () => {
  await fairlead.stop();
});

async function addCable(page: Page, name: string, areaMm2: string, serial: string): Promise<void> {
  await page.getByRole('link', { name: 'Cables', exact: true }).click();
  await page.getByRole('link', { name: 'Add a cable' }).click();
  await page.getByLabel('Name').fill(name);
  await page.getByLabel('Kind').selectOption('loudspeaker');
  await page.getByLabel('Length', { exact: true }).fill('5');
  await page.getByLabel('Conductor', { exact: true }).selectOption('silver');
  await page.getByLabel('Cross-section', { exact: true }).fill(areaMm2);
  await page.getByLabel('Geometry').selectOption('parallel');
  await page.getByLabel('Spacing of centres').fill('5');
  await page.getByLabel('Relative permittivity').fill('2.3');
  await page.getByRole('button', { name: 'Save and add specimens' }).click();
  await expect(page.getByRole('heading', { name, level: 1 })).toBeVisible();
  await page.getByLabel('Mark on the piece').fill(serial);
  await page.getByRole('button', { name: 'Add this specimen' }).click();
  await expect(page.getByText(`${serial} is added.`)).toBeVisible();
}

test('two cables, a measurement corrected in place, a comparison, and a study of the two [Q16] [Q20] [Q24]', async ({
  browser,
}) => {
  const page = await signIn(browser, fairlead.address, 'Maren Oduya');
  await addCable(page, 'Reed 1.0', '1', 'R-1');
  await addCable(page, 'Sedge 4.0', '4', 'S-1');
  await expect(page.getByText('Copper of 4.34 mm² conducts as well as this silver of 4 mm²')).toBeVisible();

  await page.getByRole('link', { name: 'Add a measurement' }).click();
  const broken = 'f/kHz;R/mΩ\n0,1;40,9\n1;4l,3\n20;52,6\n';
  await page
    .locator('input[type=file]')
    .setInputFiles({ name: '../bridge.csv', mimeType: 'text/csv', buffer: Buffer.from(broken) });
  await expect(page.getByText('One line cannot be read.')).toBeVisible();
  await expect(page.getByText('“4l,3” is not a number')).toBeVisible();
  await expectAccessible(page, 'a broken measurement');
  await page.getByLabel('Instrument').fill('Bridge 2');
  await page.getByRole('button', { name: 'Save this measurement' }).click();
  await expect(page.getByText('1 line cannot be read')).toBeVisible();
  const text = page.getByRole('textbox', { name: 'Values' });
  await expect(text).toHaveValue(broken);
  await page.getByRole('button', { name: 'Line 3' }).click();
  await expect(text).toBeFocused();
  await text.fill(broken.replace('4l,3', '41,3'));
  await expect(page.getByText('One line cannot be read.')).toBeHidden();
  await page.getByRole('button', { name: 'Save this measurement' }).click();
  await expect(page.getByRole('heading', { name: 'Resistance of S-1' })).toBeVisible();
  await expect(page.getByText('corrected before saving')).toBeVisible();
  await expect(page.getByRole('img', { name: /Resistance of each piece, and as predicted/ })).toBeVisible();
  await page.getByText('The same as a table').click();
  await expect(page.getByRole('row', { name: /^1 kHz 41\.3/ })).toBeVisible();
  const [file] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('link', { name: 'bridge.csv' }).click(),
  ]);
  expect(file.suggestedFilename()).toBe('bridge.csv');

  await page.getByRole('link', { name: 'Sedge 4.0' }).click();
  await expect(page.getByRole('row', { name: /S-1 41\.3 mΩ/ })).toBeVisible();
  await page.getByRole('link', { name: 'Compare', exact: true }).click();
  await page.getByLabel('The other cable').selectOption({ label: 'Reed 1.0, 5\u00a0m' });
  await expect(page.getByText(/By their construction they differ by at most 0\.1\d\sdB/)).toBeVisible();
  await page.getByLabel('Its resistance').fill('4');
  await expect(page.getByText(/By their construction they differ by at most 0\.2\d\sdB/)).toBeVisible();
  await expectAccessible(page, 'the comparison');

  await page.getByRole('link', { name: 'Plan a study of these two' }).click();
  await expect(page.getByRole('heading', { name: 'Plan a study', level: 1 })).toBeVisible();
  await expect(page.getByLabel('One cable')).toHaveValue(/.+/);
  await expect(page.getByRole('checkbox', { name: 'S-1' })).toBeChecked();
  await expect(page.getByRole('checkbox', { name: 'R-1' })).toBeChecked();
});
