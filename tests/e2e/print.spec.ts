import { readPdf, readPng } from '../support/picture';
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
  // A4 on its side (ISO 216, 297 mm × 210 mm): at 200 dots an inch, and in points.
  const png = readPng(await fetched('PNG'));
  expect([png.width, png.height]).toEqual([2339, 1654]);
  expect(png.colours({ left: 0.3, right: 0.7, top: 0.3, bottom: 0.6 })).toBeGreaterThan(20);
  const pdf = await readPdf(await fetched('Print PDF'));
  expect([Math.round(pdf.width), Math.round(pdf.height)]).toEqual([842, 595]);
  for (const part of ['Sable under way', 'Version 7', 'Mollweide', 'A reconstruction is a model'])
    expect(pdf.text).toContain(part);
  const geojson = JSON.parse((await fetched('GeoJSON')).toString()) as { features: unknown[] };
  expect(geojson.features.length).toBeGreaterThan(9);
});

test('opens on the latest release at half its oldest age, and says what it cannot use', async ({ page }) => {
  await signInAs(page, 'researcher', `${DEMO}/print`);
  await expect(page.getByLabel('Version')).toHaveValue('7');
  const age = page.getByLabel('Age, Ma');
  const opened = await age.inputValue();
  expect(Number(opened)).toBeGreaterThan(50);
  await expect(page).toHaveURL(/version=7/);

  await age.fill('900');
  await expect(page.getByText(/Read 900, outside the span: type an age from 0 to \d+ Ma\./)).toBeVisible();
  await expect(page).toHaveURL(new RegExp(`age_ma=${opened}&`));
  await age.fill('62,4');
  await expect(page).toHaveURL(/age_ma=62\.4&/);
  await expect(page.getByText('outside the span')).toBeHidden();

  await page.getByRole('combobox', { name: 'Block' }).selectOption('tarn');
  await expect(page.getByText(/^Through .+; type another point/)).toBeVisible();
  await expect(page).toHaveURL(/path_block=tarn&path_lat=/);

  await page.getByLabel('Version').selectOption('draft');
  await page.waitForURL(/version=draft/);
  await expect(page.getByLabel('Age, Ma')).toHaveValue('62.4');
  await page.goto(`${DEMO}/print?age_ma=soon&paper=a5`);
  await expect(page.getByText('Left out of the link: age_ma: read “soon”')).toBeVisible();
});
