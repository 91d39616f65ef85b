import { DEMO, expect, signInAs, test } from './support';

test('prints a time slice as SVG, PNG and PDF', async ({ page }) => {
  await signInAs(page, 'instructor', `${DEMO}/print?age_ma=62.4&version=7`);
  const picture = page.getByRole('img', { name: 'Time slice at 62.4 Ma' });
  await expect(picture).toBeVisible();
  await expect.poll(() => picture.evaluate((img: HTMLImageElement) => img.naturalWidth)).toBeGreaterThan(500);
  await page.getByLabel('Projection').selectOption('mollweide');
  await page.getByLabel('Velocity').check();
  await page.getByRole('textbox', { name: 'Title' }).fill('Sable under way');
  await expect(page).toHaveURL(/projection=mollweide/);

  const fetched = async (name: string): Promise<Buffer> => {
    const waiting = page.waitForEvent('download');
    await page.getByRole('link', { name }).click();
    const stream = await (await waiting).createReadStream();
    const chunks: Buffer[] = [];
    for await (const chunk of stream) chunks.push(chunk as Buffer);
    return Buffer.concat(chunks);
  };
  const svg = (await fetched('SVG')).toString();
  for (const part of [
    'Sable under way',
    'Version 7',
    'Mollweide',
    'class="velocity"',
    'A reconstruction is a model',
  ])
    expect(svg.includes(part)).toBe(true);
  const png = await fetched('PNG');
  expect(png.subarray(1, 4).toString()).toBe('PNG');
  const pdf = await fetched('Print PDF');
  expect(pdf.subarray(0, 5).toString()).toBe('%PDF-');
  const geojson = JSON.parse((await fetched('GeoJSON')).toString()) as { features: unknown[] };
  expect(geojson.features.length).toBeGreaterThan(9);
});
