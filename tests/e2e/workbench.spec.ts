/** The workbench in a real browser, on the demo: age, held still, drift path, ledger and undo, by mouse and by keyboard only. */
import { readFileSync } from 'node:fs';
import type { Page } from '@playwright/test';
import type { Feature, FeatureCollection, LineString, Point, Position } from 'geojson';
import { DEMO, expect, signInAs, tabTo, test } from './support';

const LINK = `${DEMO}/workbench?age=62.4&frame=spin-axis&block=sable`;
const slider = (page: Page) => page.getByRole('slider', { name: /age/i });

test.describe('reading', () => {
  test('shows the figures of the scenario without an account', async ({ page }) => {
    await page.goto(LINK);
    // The invented scenario's own tables give these (design pictures of the project).
    await expect(page.getByText('21.1° S, 36.6° E', { exact: true })).toBeVisible();
    await expect(page.getByText(/298 × 220/).first()).toBeVisible();
    await expect(page.getByText('Hand-over at 55.2 Ma jumps 17 km.')).toBeVisible();
    await expect(page.getByRole('grid', { name: 'Rotations of Sable terrane' })).toContainText(
      'between the rows around it',
    );
  });

  test('dragging the age line moves everything without a request', async ({ page }) => {
    await page.goto(LINK);
    await expect(page.getByText('21.1° S, 36.6° E', { exact: true })).toBeVisible();
    await page.waitForTimeout(500);
    const requests: string[] = [];
    page.on('request', (request) => {
      if (new URL(request.url()).pathname.startsWith('/api/')) requests.push(request.url());
    });
    const box = (await slider(page).boundingBox())!;
    await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2);
    await page.mouse.down();
    await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2 + 80, { steps: 8 });
    await page.mouse.up();
    await expect(slider(page)).not.toHaveAttribute('aria-valuenow', '62.4');
    await expect(page.getByText('21.1° S, 36.6° E', { exact: true })).toHaveCount(0);
    await expect(page).toHaveURL(/age=(?!62\.4)/);
    expect(requests).toEqual([]);
  });

  test('holding another block still changes the frame everywhere', async ({ page }) => {
    await page.goto(LINK);
    await page.getByRole('button', { name: /Held still/ }).click();
    await page
      .getByRole('menuitemradio', { name: /Old Harrow/ })
      .or(page.getByRole('menuitem', { name: /Old Harrow/ }))
      .first()
      .click();
    await expect(page).toHaveURL(/frame=old-harrow/);
    await expect(page.getByText('21.1° S, 36.6° E', { exact: true })).toHaveCount(0);
  });

  const panel = (page: Page) => page.getByRole('tabpanel');
  const keep = async (page: Page, label: string, value: string): Promise<void> => {
    const field = panel(page).getByLabel(label, { exact: true });
    await field.fill(value);
    await field.press('Enter');
  };
  const pathTable = (page: Page) => panel(page).getByRole('region', { name: 'Drift path' });

  /** Rows of the table as numbers: "21.1° S, 36.6° E" is −21.1, 36.6. */
  async function tableRows(page: Page): Promise<{ age: number; lat: number; lon: number }[]> {
    const rows = await pathTable(page).locator('tbody tr').all();
    return Promise.all(
      rows.map(async (row) => {
        const [age = '', at = ''] = await row.getByRole('cell').allInnerTexts();
        const read = /([\d.]+)°\s*([NS]),\s*([\d.]+)°\s*([EW])/.exec(at);
        if (!read) return { age: Number(age.replace('▏', '').trim()), lat: NaN, lon: NaN };
        return {
          age: Number(age.replace('▏', '').trim()),
          lat: Number(read[1]) * (read[2] === 'S' ? -1 : 1),
          lon: Number(read[3]) * (read[4] === 'W' ? -1 : 1),
        };
      }),
    );
  }

  async function download(page: Page, name: string): Promise<string> {
    const waiting = page.waitForEvent('download');
    await panel(page).getByRole('link', { name }).click();
    return readFileSync(await (await waiting).path(), 'utf8');
  }

  test('a drift path is set, read as a table and exported', async ({ page }) => {
    await page.goto(LINK);
    await page.getByRole('tab', { name: /Drift path/ }).click();
    await keep(page, 'From, Ma', '100');
    await keep(page, 'Step, Myr', '20');
    await expect(page).toHaveURL(/path=/);
    await expect(
      panel(page)
        .getByRole('row')
        .filter({ hasText: /^▏?100/ }),
    ).toHaveCount(1);
    const shown = await tableRows(page);

    const csv = (await download(page, 'CSV')).trim().split(/\r?\n/);
    expect(csv[0]).toContain('block,relative_to,version,age_ma,lat,lon');
    expect(csv).toHaveLength(shown.length + 1);
    expect(csv.some((line) => line.startsWith('sable,spin-axis,draft,100,'))).toBe(true);

    const file = JSON.parse(await download(page, 'GeoJSON')) as FeatureCollection<Point | LineString>;
    const marks = file.features.filter((one): one is Feature<Point> => one.geometry.type === 'Point');
    const line = file.features.find((one): one is Feature<LineString> => one.geometry.type === 'LineString')!;
    expect(marks).toHaveLength(shown.length);
    const rounded = ([lon = 0, lat = 0]: Position) => ({
      lat: Number(lat.toFixed(1)),
      lon: Number(lon.toFixed(1)),
    });
    for (const [i, at] of [marks[0]!, marks.at(-1)!].entries()) {
      const { age, ...place } = (i === 0 ? shown[0] : shown.at(-1))!;
      expect(at.properties).toMatchObject({ block: 'sable', relative_to: 'spin-axis' });
      expect(Number((at.properties as { age_ma: number }).age_ma.toFixed(1))).toBe(age);
      expect(rounded(at.geometry.coordinates)).toEqual(place);
      const end = i === 0 ? line.geometry.coordinates[0]! : line.geometry.coordinates.at(-1)!;
      expect(rounded(end)).toEqual(place);
    }
    expect(new Set([shown[0]!.age, shown.at(-1)!.age])).toEqual(new Set([0, 100]));

    await page.goto(page.url());
    await page.getByRole('tab', { name: /Drift path/ }).click();
    await expect(page.getByLabel('Step, Myr')).toHaveValue('20');
  });

  test('a drift path’s point is typed', async ({ page }) => {
    await page.goto(`${LINK}&path=0,60,20`);
    await page.getByRole('tab', { name: /Drift path/ }).click();
    await keep(page, 'Today, °N', '\u221228.5');
    await keep(page, '°E', '42,5');
    await expect(page).toHaveURL(/lat=-28\.5&lon=42\.5/);
    await expect(panel(page)).toContainText('28.5° S, 42.5° E today');
    // At 0 Ma a point lies where it lies, in whatever frame.
    expect((await tableRows(page)).find(({ age }) => age === 0)).toEqual({ age: 0, lat: -28.5, lon: 42.5 });
    const asked = await page.request.get('/api/projects/lantern-sea/drift-path?version=draft&block=sable&lat=-28.5&lon=42.5&older_ma=60&younger_ma=0&step_ma=20&relative_to=spin-axis'); // prettier-ignore
    const { points } = (await asked.json()) as { points: { age_ma: number; lat: number; lon: number }[] };
    const figures = (rows: { age: number; lat: number; lon: number }[]) =>
      rows.map(({ age, lat, lon }) => [age, lat, lon].map((n) => n.toFixed(1)).join(' ')).sort();
    expect(figures(await tableRows(page))).toEqual(
      figures(points.map(({ age_ma, lat, lon }) => ({ age: age_ma, lat, lon }))),
    );
    await keep(page, 'Today, °N', '91');
    await expect(panel(page).getByLabel('Today, °N', { exact: true })).toHaveAttribute(
      'aria-invalid',
      'true',
    );
    await expect(page).toHaveURL(/lat=-28\.5&lon=42\.5/);
  });

  test('a drift path’s point is clicked on the globe', async ({ page }) => {
    // At 0 Ma blocks lie at their present places: what is clicked in the middle of the globe is the centre of the view.
    await page.goto(`${DEMO}/workbench?age=0&frame=spin-axis&block=quill&centre=-29.6,41.2`);
    await page.getByRole('tab', { name: /Drift path/ }).click();
    const before = await pathTable(page).innerText();
    const box = (await page.getByRole('application').first().boundingBox())!;
    await page.mouse.click(box.x + box.width / 2, box.y + box.height / 2);
    await expect(page).toHaveURL(/block=sable/);
    await expect(page).toHaveURL(/lat=/);
    const clicked = new URL(page.url()).searchParams;
    const [lat, lon] = [Number(clicked.get('lat')), Number(clicked.get('lon'))];
    // A pixel is some 0.2° at this size.
    expect(Math.abs(lat + 29.6)).toBeLessThan(0.25);
    expect(Math.abs(lon - 41.2)).toBeLessThan(0.25);
    await expect(panel(page)).toContainText(`${(-lat).toFixed(1)}° S, ${lon.toFixed(1)}° E today`);
    expect(await pathTable(page).innerText()).not.toBe(before);
    const present = (await tableRows(page)).find(({ age }) => age === 0)!;
    expect(present).toEqual({ age: 0, lat: Number(lat.toFixed(1)), lon: Number(lon.toFixed(1)) });
  });

  test('the address keeps the version that is shown, whatever moves', async ({ page }) => {
    await page.goto(`${DEMO}/workbench?version=7&age=62.4&block=sable`);
    await expect(async () => {
      await page.keyboard.press('2');
      await expect(page).toHaveURL(/version=7&.*view=map/, { timeout: 1_000 });
    }).toPass();
    await page.reload();
    await expect(page.getByText('v7').first()).toBeVisible();
    await expect(page).toHaveURL(/version=7&.*view=map/);
  });

  test('an age beyond the rotations is not taken for another', async ({ page }) => {
    await page.goto(LINK);
    await page.getByRole('button', { name: /Age, 62\.4 Ma: change/ }).click();
    const field = page.getByRole('textbox', { name: 'Age in Ma' });
    await field.fill('999');
    await field.press('Enter');
    await expect(page.getByText('The rotations go back to 200 Ma.')).toBeVisible();
    await expect(field).toHaveAttribute('aria-invalid', 'true');
    await field.fill('80,5');
    await field.press('Enter');
    await expect(page.getByRole('button', { name: /Age, 80\.5 Ma: change/ })).toBeVisible();
    await page.keyboard.press('/');
    await page.keyboard.type('300');
    await expect(page.getByText('The rotations go back to 200 Ma.')).toBeVisible();
  });

  test('then and now, and the map', async ({ page }) => {
    await page.goto(LINK);
    await page
      .getByRole('radio', { name: 'Then and now' })
      .or(page.getByRole('button', { name: 'Then and now' }))
      .first()
      .click();
    await expect(page.getByText('today’s map')).toBeVisible();
    await page
      .getByRole('radio', { name: 'Map' })
      .or(page.getByRole('button', { name: 'Map', exact: true }))
      .first()
      .click();
    await expect(page).toHaveURL(/view=map/);
  });
});

test.describe('editing', () => {
  const grid = (page: Page) => page.getByRole('grid', { name: 'Rotations of Sable terrane' });
  const angle66 = (page: Page) =>
    grid(page).getByRole('row').filter({ hasText: '66.0' }).getByRole('gridcell').nth(4);

  test('a cell is edited, previewed, kept and undone', async ({ page }) => {
    await signInAs(page, 'researcher', LINK);
    await angle66(page).dblclick();
    const input = grid(page)
      .getByRole('textbox', { name: 'Angle, °' })
      .or(grid(page).getByRole('combobox', { name: 'Angle, °' }))
      .first();
    await input.fill('9.86');
    await expect(page.getByRole('status').filter({ hasText: 'was 9.64' })).toContainText('Moves Sable');
    await input.press('Enter');
    await expect(angle66(page)).toHaveText('9.86');
    await expect
      .poll(async () => (await page.request.get('/api/projects/lantern-sea/rotations?version=draft')).text())
      .toContain('"angle_deg":9.86');
    await page.getByRole('button', { name: 'Undo' }).click();
    await expect(angle66(page)).toHaveText('9.64');
  });

  test('a wrong value stays at its cell with the problem, and Escape puts back', async ({ page }) => {
    await signInAs(page, 'researcher', LINK);
    await angle66(page).dblclick();
    const input = grid(page).getByRole('textbox', { name: 'Angle, °' });
    await input.fill('fast');
    await input.press('Enter');
    await expect(angle66(page)).toHaveAttribute('aria-invalid', 'true');
    await expect(page.getByRole('status').filter({ hasText: 'not a number' })).toBeVisible();
    await page.getByRole('button', { name: 'Put back' }).click();
    await expect(angle66(page)).toHaveText('9.64');
  });

  test('what is typed while the server is not heard is kept, said to be, and sent later', async ({
    page,
    context,
  }) => {
    await signInAs(page, 'researcher', LINK);
    await expect(angle66(page)).toHaveText('9.64');
    await context.setOffline(true);
    const offline = page.getByRole('status').filter({ hasText: /^Offline\. Shown as of \d\d:\d\d/ });
    await expect(offline).toBeVisible();
    await angle66(page).dblclick();
    await grid(page).getByRole('textbox', { name: 'Angle, °' }).fill('9.77');
    await page.keyboard.press('Enter');
    await expect(angle66(page)).toHaveText('9.77');
    await expect(page.getByRole('status').filter({ hasText: 'kept here and sent again' })).toBeVisible();
    await context.setOffline(false);
    await expect(offline).toBeHidden();
    await expect
      .poll(async () => (await page.request.get('/api/projects/lantern-sea/rotations?version=draft')).text())
      .toContain('"angle_deg":9.77');
    await page.getByRole('button', { name: 'Undo' }).click();
    await expect(angle66(page)).toHaveText('9.64');
  });

  test('two people in one cell: the second is told, and chooses', async ({ page, browser }) => {
    await signInAs(page, 'researcher', LINK);
    await expect(angle66(page)).toHaveText('9.64');
    await angle66(page).dblclick();
    await grid(page).getByRole('textbox', { name: 'Angle, °' }).fill('9.80');

    const other = await browser.newContext();
    const theirs = await other.newPage();
    await signInAs(theirs, 'lead', LINK);
    await angle66(theirs).dblclick();
    await grid(theirs).getByRole('textbox', { name: 'Angle, °' }).fill('9.70');
    await theirs.keyboard.press('Enter');
    await expect(angle66(theirs)).toHaveText('9.70');

    await page.waitForTimeout(1500);
    await page.keyboard.press('Enter');
    await expect(page.getByRole('status').filter({ hasText: /Changed by .+ at \d\d:\d\d/ })).toBeVisible();
    const draft = async (): Promise<string> =>
      (await page.request.get('/api/projects/lantern-sea/rotations?version=draft')).text();
    expect(await draft()).toContain('"angle_deg":9.7,');
    await page.getByRole('button', { name: 'Keep theirs' }).click();
    await expect(angle66(page)).toHaveText('9.70');
    await theirs.getByRole('button', { name: 'Undo' }).click();
    await expect(angle66(theirs)).toHaveText('9.64');
    await expect(angle66(page)).toHaveText('9.64');
    await other.close();
  });

  test('a loop in the circuit is marked at its ages, and undo mends it', async ({ page }) => {
    await signInAs(page, 'researcher', LINK);
    const api = '/api/projects/lantern-sea';
    const rows = (await (
      await page.request.get(`${api}/rotations?version=draft&block=old-harrow&limit=100`)
    ).json()) as { items: { id: string }[] };
    const { revision } = (await (await page.request.get(`${api}/motions?version=draft`)).json()) as {
      revision: number;
    };
    const answer = await page.request.post(`${api}/edits`, {
      headers: { origin: new URL(page.url()).origin, 'if-match': `"${revision}"` },
      data: {
        edits: rows.items.map(({ id }) => ({
          ...{ op: 'update', table: 'rotations', id },
          fields: { relative_to: 'sable' },
        })),
      },
    });
    expect(answer.status()).toBe(200);
    // Sable refers to Old Harrow from 0 to 55.2 Ma in the scenario's own table; beyond that to Tarn.
    const why = page.getByText('The circuit runs in a loop');
    await expect(page.getByRole('group', { name: 'Latitude' }).filter({ has: why })).toContainText(
      'between 0 and 55.2 Ma',
    );
    await expect(page.getByRole('group', { name: 'Speed' }).locator('path')).not.toHaveCount(0);
    await page.getByRole('button', { name: 'Undo' }).click();
    await expect(why).toHaveCount(0);
  });

  test('by keyboard only: age, jump, cell, undo', async ({ page }) => {
    const bench = `${DEMO}/workbench?age=60&frame=spin-axis&block=sable`;
    await page.goto(`/sign-in?next=${encodeURIComponent(bench)}`);
    await tabTo(page, page.getByRole('button', { name: /, researcher$/ }));
    await page.keyboard.press('Enter');
    await page.waitForURL((url) => url.pathname === `${DEMO}/workbench`);
    await expect(grid(page)).toBeVisible();
    // The address is completed by the script that listens for keys.
    await expect(page).toHaveURL(/centre=/);
    await page.keyboard.press('Shift+ArrowDown');
    await expect(page).toHaveURL(/age=70/);
    await page.keyboard.press('Alt+ArrowUp');
    await expect(page).toHaveURL(/age=69\.9/);
    await page.keyboard.press('/');
    await page.keyboard.type('66');
    await page.keyboard.press('Enter');
    await expect(page).toHaveURL(/age=66(&|$)/);
    await tabTo(page, grid(page));
    await page.keyboard.press('Control+Home');
    for (let i = 0; i < 7; i++) await page.keyboard.press('ArrowDown');
    await page.keyboard.press('End');
    await page.keyboard.type('By hand');
    await page.keyboard.press('Enter');
    await expect(grid(page)).toContainText('By hand');
    await expect
      .poll(async () => (await page.request.get('/api/projects/lantern-sea/rotations?version=draft')).text())
      .toContain('By hand');
    await page.keyboard.press('Control+z');
    await expect(grid(page)).not.toContainText('By hand');
  });
});

test('reads at 360 px: globe, one strip, the sentence', async ({ page }) => {
  await page.setViewportSize({ width: 360, height: 780 });
  await page.goto(`${LINK}&version=7`);
  await expect(page.getByText('21.1° S, 36.6° E', { exact: true })).toBeVisible();
  await page.getByRole('tab', { name: 'Speed' }).click();
  await page.getByRole('button', { name: 'Why here?' }).click();
  await expect(page.getByText('Tolland et al. 2021').first()).toBeVisible();
});
