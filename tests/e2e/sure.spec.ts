/** How sure, and why here: ellipses and bands with the age line, the answer as text, motion across a margin. */
import { expect, test, DEMO } from './support';

const LINK = `${DEMO}/workbench?version=draft&age=62.4&frame=spin-axis&block=sable`;

test('region and rows follow the age, and the answer can be copied', async ({ page, context }) => {
  await context.grantPermissions(['clipboard-read', 'clipboard-write']);
  await page.goto(LINK);
  const notebook = page.getByRole('region', { name: 'Notebook' });
  await expect(notebook).toContainText('within 298 × 220 km (95 %)');
  await expect(notebook).toContainText('fitted, 23 % of the way to the older row; without it');
  await notebook.getByRole('button', { name: 'table' }).click();
  await expect(notebook.getByRole('status')).toHaveText('The table is copied.');
  const table = await page.evaluate(() => navigator.clipboard.readText());
  const [head, ...rows] = table.split('\n').map((line) => line.split('\t'));
  expect(head!.slice(0, 4)).toEqual(['rotation', 'pole_lat', 'pole_lon', 'angle_deg']);
  expect(rows.map(([name]) => name)).toEqual(['Sable in Tarn', 'Tarn in mantle', 'mantle in spin axis']);
  const shares = rows.map((cells) => Number(cells[head!.indexOf('share')]));
  expect(shares.reduce((sum, share) => sum + share, 0)).toBeCloseTo(1, 6);

  await page.getByRole('slider', { name: /age/i }).press('PageUp');
  await expect(notebook).not.toContainText('within 298 × 220 km');
  await expect(notebook).toContainText(/within .* km \(95 %\)/);
  await expect(page.getByText('weak at this age')).toBeVisible();
});

test('motion across a margin is read at every age and downloaded', async ({ page }) => {
  await page.goto(LINK);
  await page.getByRole('tab', { name: 'Across a margin' }).click();
  await page.getByLabel('Right, held still').selectOption('old-harrow');
  const azimuth = page.getByLabel('Margin’s azimuth, °');
  await azimuth.fill('90');
  await azimuth.press('Enter');
  const table = page.getByRole('region', { name: 'Across the margin' });
  const row = table.getByRole('row').filter({ hasText: /^▏?60/ });
  const [, closing, slip, speed, , obliquity] = await row.getByRole('cell').allInnerTexts();
  const numbers = [closing, slip, speed, obliquity].map((text) => Number(text!.replace('−', '-')));
  expect(Math.hypot(numbers[0]!, numbers[1]!)).toBeCloseTo(numbers[2]!, 0);
  const angle = (Math.atan2(Math.abs(numbers[1]!), Math.abs(numbers[0]!)) * 180) / Math.PI;
  expect(Math.abs(angle - numbers[3]!)).toBeLessThan(1.5);
  // Along the other way the margin has its sides exchanged: the signs turn round.
  await azimuth.fill('270');
  await azimuth.press('Enter');
  await expect(row.getByRole('cell').nth(1)).not.toHaveText(closing!);
  const turned = Number((await row.getByRole('cell').nth(1).innerText()).replace('−', '-'));
  expect(turned).toBeCloseTo(-numbers[0]!, 1);

  const waiting = page.waitForEvent('download');
  await page.getByRole('link', { name: 'CSV' }).click();
  expect((await waiting).suggestedFilename()).toBe('convergence-sable-old-harrow.csv');
});
