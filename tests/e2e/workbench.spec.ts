/** The workbench in a real browser, on the demo: age, held still, drift path, ledger and undo, by mouse and by keyboard only. */
import type { Page } from '@playwright/test';
import { DEMO, expect, signInAs, test } from './support';

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

  test('a drift path is set, read as a table and exported', async ({ page }) => {
    await page.goto(LINK);
    await page.getByRole('tab', { name: /Drift path/ }).click();
    const panel = page.getByRole('tabpanel');
    await panel.getByLabel('From, Ma').fill('100');
    await panel.getByLabel('From, Ma').press('Enter');
    await panel.getByLabel('Step, Myr').fill('20');
    await panel.getByLabel('Step, Myr').press('Enter');
    await expect(page).toHaveURL(/path=/);
    const rows = panel.getByRole('row');
    await expect(rows.filter({ hasText: /^▏?100/ })).toHaveCount(1);
    const waiting = page.waitForEvent('download');
    await panel.getByRole('link', { name: 'CSV' }).click();
    const path = await (await waiting).path();
    const { readFileSync } = await import('node:fs');
    const csv = readFileSync(path, 'utf8');
    expect(csv.split(/\r?\n/)[0]).toContain('age_ma');
    expect(csv).toMatch(/sable,spin-axis,draft,100,/);
    const reopened = page.url();
    await page.goto(reopened);
    await page.getByRole('tab', { name: /Drift path/ }).click();
    await expect(page.getByLabel('Step, Myr')).toHaveValue('20');
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
    await signInAs(page, 'researcher', `${DEMO}/workbench?age=60&frame=spin-axis&block=sable`);
    await expect(grid(page)).toBeVisible();
    await page.getByRole('heading', { name: 'What rests on it' }).click();
    await page.keyboard.press('Shift+ArrowDown');
    await expect(page).toHaveURL(/age=70/);
    await page.keyboard.press('Alt+ArrowUp');
    await expect(page).toHaveURL(/age=69\.9/);
    await page.keyboard.press('/');
    await page.keyboard.type('66');
    await page.keyboard.press('Enter');
    await expect(page).toHaveURL(/age=66(&|$)/);
    await grid(page).focus();
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
