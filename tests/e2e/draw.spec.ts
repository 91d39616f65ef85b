import { expect, ownProject, test } from './support';

interface Listed {
  readonly id: string;
  readonly code: string;
  readonly outlines: readonly { readonly sha256: string }[];
}

test('an outline is drawn on the globe, its corners moved, and both undone', async ({ page }) => {
  const slug = 'drawn-by-hand';
  await ownProject(page, slug);
  await page.goto(`/projects/${slug}/workbench`);
  const blocks = async (): Promise<readonly Listed[]> =>
    (
      (await (await page.request.get(`/api/projects/${slug}/blocks?version=draft`)).json()) as {
        items: Listed[];
      }
    ).items;

  await page.getByRole('button', { name: 'Draw an outline' }).click();
  const globe = page.getByRole('application').first();
  const box = (await globe.boundingBox())!;
  const [cx, cy] = [box.x + box.width / 2, box.y + box.height / 2];
  for (const [dx, dy] of [[-60, 40], [70, 30], [10, -70]] as const) await page.mouse.click(cx + dx, cy + dy); // prettier-ignore
  await expect(page.getByText('3 corners', { exact: false })).toBeVisible();
  await page.keyboard.press('Enter');
  await page.getByLabel('Name').fill('Alder terrane');
  await expect(page.getByLabel('Code')).toHaveValue('alder-terrane');
  await page.getByRole('button', { name: 'Keep', exact: true }).click();
  await expect(page.getByText('Alder terrane is drawn.')).toBeVisible();
  const [drawn] = await blocks();
  expect(drawn).toMatchObject({ code: 'alder-terrane' });
  expect(drawn!.outlines).toHaveLength(1);

  await page.getByRole('button', { name: 'Move corners of Alder terrane' }).click();
  const corner = page.getByRole('button', { name: /^Corner 1 of 3/ });
  await corner.focus();
  await page.keyboard.press('Shift+ArrowUp');
  await page.keyboard.press('Escape');
  expect((await blocks())[0]!.outlines[0]!.sha256).toBe(drawn!.outlines[0]!.sha256);

  await page.getByRole('button', { name: 'Move corners of Alder terrane' }).click();
  await page.getByRole('button', { name: /^Corner 1 of 3/ }).focus();
  await page.keyboard.press('Shift+ArrowUp');
  await page.getByRole('button', { name: 'Keep the outline' }).click();
  await expect(page.getByText('The outline is kept.')).toBeVisible();
  expect((await blocks())[0]!.outlines[0]!.sha256).not.toBe(drawn!.outlines[0]!.sha256);

  await page.getByRole('button', { name: 'Undo' }).click();
  await expect.poll(async () => (await blocks())[0]?.outlines[0]?.sha256).toBe(drawn!.outlines[0]!.sha256);
  await page.getByRole('button', { name: 'Undo' }).click();
  await expect.poll(async () => (await blocks()).length).toBe(0);
});

test('an outline of two parts is edited part by part, and the other stays to the last digit', async ({
  page,
}) => {
  const slug = 'two-parts';
  await ownProject(page, slug);
  const island = [[20.123456, 0], [30, 1], [25, 9], [20.123456, 0]]; // prettier-ignore
  const islet = [[-20, 0], [-12, 1], [-15, 9], [-20, 0]]; // prettier-ignore
  const feature = {
    type: 'Feature',
    properties: { code: 'alder', name: 'Alder arc', kind: 'arc' },
    geometry: { type: 'MultiPolygon', coordinates: [[island], [islet]] },
  };
  const text = JSON.stringify({ type: 'FeatureCollection', features: [feature] });
  const sent = await page.request.post(`/api/projects/${slug}/imports`, {
    headers: { origin: new URL(page.url()).origin },
    multipart: {
      kind: 'blocks',
      file: { name: 'b.geojson', mimeType: 'application/geo+json', buffer: Buffer.from(text) },
    },
  });
  expect(await sent.json()).toMatchObject({ written: true });

  await page.goto(`/projects/${slug}/workbench?block=alder&centre=0,5`);
  await page.getByRole('button', { name: 'Move corners of Alder arc' }).click();
  await page.getByRole('combobox', { name: 'Ring' }).selectOption('Part 2');
  await page.getByRole('button', { name: /^Corner 2 of 3/ }).focus();
  await page.keyboard.press('Shift+ArrowUp');
  await page.getByRole('button', { name: 'Keep the outline' }).click();
  await expect(page.getByText('The outline is kept.')).toBeVisible();
  const file = (await (
    await page.request.get(`/api/projects/${slug}/exports/blocks.geojson?version=draft`)
  ).json()) as { features: { geometry: { coordinates: number[][][][] } }[] };
  const parts = file.features[0]!.geometry.coordinates;
  expect(parts[0]).toEqual([island]);
  // Shift with an arrow moves a corner by one degree of latitude.
  expect(parts[1]).toEqual([[islet[0], [-12, 2], islet[2], islet[0]]]);
});
