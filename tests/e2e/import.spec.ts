import { expect, ownProject, test } from './support';

const square = (w: number, s: number, e: number, n: number): number[][] => [[w, s], [e, s], [e, n], [w, n], [w, s]]; // prettier-ignore
const block = (code: string, ring: number[][] | null) => ({
  type: 'Feature',
  properties: { code, name: `${code} block`, kind: ring ? 'terrane' : 'frame', evidence: 'fitted' },
  geometry: ring && { type: 'Polygon', coordinates: [ring] },
});
const collection = (features: object[]): string => JSON.stringify({ type: 'FeatureCollection', features });

test('two files with mistakes are previewed, mended and accepted, and the blocks stand on the globe', async ({
  page,
}) => {
  await ownProject(page, 'two-blocks-import');
  const bowTie = [[60, 0], [70, 10], [70, 0], [60, 10], [60, 0]]; // prettier-ignore
  const file = (name: string, text: string) => ({ name, mimeType: 'text/plain', buffer: Buffer.from(text) });
  const choose = page.getByLabel('File to import');

  await choose.setInputFiles(
    file(
      'blocks.geojson',
      collection([block('alder', square(0, 0, 20, 15)), block('birch', bowTie), block('axis', null)]),
    ),
  );
  await expect(page.getByText('2 rows can be taken, 1 cannot')).toBeVisible();
  await expect(page.getByRole('region', { name: 'Rejected rows' })).toContainText('crosses itself');
  await choose.setInputFiles(
    file(
      'blocks.geojson',
      collection([
        block('alder', square(0, 0, 20, 15)),
        block('birch', square(60, 0, 70, 10)),
        block('axis', null),
      ]),
    ),
  );
  await expect(page.getByText('3 rows can be taken')).toBeVisible();
  await page.getByRole('button', { name: 'Accept 3 rows' }).click();
  await expect(page.getByText('3 rows written to the draft')).toBeVisible();

  const rows = [
    'block;relative_to;age_ma;pole_lat;pole_lon;angle_deg',
    'alder;axis;0;0;0;0',
    'alder;axis;50;90;0;12,5',
    'birch;alder;0;0;0;0',
    'birch;alder;50;98,1;20;8',
  ];
  await choose.setInputFiles(file('rotations.csv', rows.join('\n')));
  await expect(page.getByText('Are they decimal commas?')).toBeVisible();
  await page.getByLabel('decimal commas').check();
  await page.getByRole('button', { name: 'Read again with these answers' }).click();
  await expect(page.getByRole('region', { name: 'Rejected rows' })).toContainText('latitude beyond 90°');
  rows[4] = 'birch;alder;50;58,1;20;8';
  await choose.setInputFiles(file('rotations.csv', rows.join('\n')));
  await page.getByLabel('decimal commas').check();
  await page.getByRole('button', { name: 'Read again with these answers' }).click();
  await page.getByRole('button', { name: 'Accept 4 rows' }).click();
  await page.getByRole('link', { name: 'Open the workbench' }).click();
  await expect(page.getByRole('heading', { name: 'Two blocks: workbench' })).toBeAttached();
  await expect(page.getByRole('grid', { name: /Rotations/ })).toContainText('12.5');
});

test('on the real Earth one click cuts the present coast by the outlines', async ({ page }) => {
  const slug = 'southern-continent';
  await ownProject(page, slug);
  const outline = block('austral', square(110, -45, 156, -10));
  const text = collection([outline, block('axis', null)]);
  await page
    .getByLabel('File to import')
    .setInputFiles({ name: 'blocks.geojson', mimeType: 'text/plain', buffer: Buffer.from(text) });
  await page.getByRole('button', { name: 'Accept 2 rows' }).click();
  await expect(page.getByText('2 rows written to the draft')).toBeVisible();
  await page.getByRole('button', { name: 'Cut the present coast by the outlines' }).click();
  await page.waitForURL(`**/projects/${slug}/workbench**`);
  const features = (await (
    await page.request.get(`/api/projects/${slug}/features?version=draft`)
  ).json()) as { items: { kind: string; name: string; source: string; vertices: number }[] };
  expect(features.items).toHaveLength(1);
  expect(features.items[0]).toMatchObject({ kind: 'layer', name: 'austral block, present coast' });
  expect(features.items[0]!.source).toContain('Natural Earth');
  expect(features.items[0]!.vertices).toBeGreaterThan(500);
});
