/** Edits on bad days: a slow line, an answer lost on its way, a session that ends, no line at all. */
import type { Page } from '@playwright/test';
import { expect, signInAs, test } from './support';

const LINK = '/projects/lantern-sea/workbench?version=draft&age=62.4&block=sable';
const API = '/api/projects/lantern-sea';

const cell = (page: Page, age: string) =>
  page
    .getByRole('grid', { name: 'Rotations of Sable terrane' })
    .getByRole('row')
    .filter({ hasText: age })
    .getByRole('gridcell')
    .nth(4);

async function type(page: Page, age: string, text: string): Promise<void> {
  await cell(page, age).dblclick();
  await page.getByRole('textbox', { name: 'Angle, °' }).fill(text);
  await page.keyboard.press('Enter');
}

const saved = async (page: Page): Promise<Record<string, number>> => {
  const { items } = (await (await page.request.get(`${API}/rotations?version=draft&block=sable`)).json()) as {
    items: { age_ma: number; angle_deg: number }[];
  };
  return Object.fromEntries(items.map(({ age_ma, angle_deg }) => [age_ma, angle_deg]));
};
const revision = async (page: Page): Promise<number> =>
  ((await (await page.request.get(`${API}/motions?version=draft`)).json()) as { revision: number }).revision;

test('three cells typed one after the other on a slow line are all saved, and nobody is told of themselves', async ({
  page,
}) => {
  await signInAs(page, 'researcher', LINK);
  await expect(cell(page, '66.0')).toHaveText('9.64');
  const before = await saved(page);
  await page.route('**/edits', async (route) => {
    await new Promise((later) => setTimeout(later, 1_200));
    await route.continue();
  });
  await type(page, '61.3', '8.1');
  await type(page, '66.0', '9.1');
  await type(page, '73.6', '10.1');
  await expect.poll(() => saved(page), { timeout: 15_000 }).toMatchObject({ 61.3: 8.1, 66: 9.1, 73.6: 10.1 });
  await expect(page.getByText(/Changed by/)).toBeHidden();
  for (let i = 0; i < 3; i++) {
    await page.getByRole('button', { name: 'Undo' }).click();
    await page.waitForTimeout(400);
  }
  await expect.poll(() => saved(page), { timeout: 15_000 }).toEqual(before);
});

test('an edit whose answer is lost is made once', async ({ page }) => {
  await signInAs(page, 'researcher', LINK);
  await expect(cell(page, '66.0')).toHaveText('9.64');
  const start = await revision(page);
  let lost = 0;
  await page.route('**/edits', async (route) => {
    if (lost++ > 0) return route.continue();
    await route.fetch();
    return route.abort('connectionreset');
  });
  await type(page, '66.0', '9.2');
  await expect(page.getByRole('status').filter({ hasText: 'kept here and sent again' })).toBeVisible();
  await expect.poll(() => lost, { timeout: 25_000 }).toBe(2);
  await expect(page.getByRole('status').filter({ hasText: 'kept here and sent again' })).toBeHidden();
  await expect(cell(page, '66.0')).toHaveText('9.20');
  expect(await revision(page)).toBe(start + 1);
  await page.getByRole('button', { name: 'Undo' }).click();
  await expect(cell(page, '66.0')).toHaveText('9.64');
});

test('what is typed after the session has ended is kept, and sent once signed in again', async ({
  page,
  context,
}) => {
  await signInAs(page, 'researcher', LINK);
  await expect(cell(page, '66.0')).toHaveText('9.64');
  await context.clearCookies({ name: 'driftwright_session' });
  await type(page, '66.0', '9.3');
  await expect(page.getByRole('status').filter({ hasText: 'You are signed out' })).toBeVisible();
  const other = await context.newPage();
  await signInAs(other, 'researcher');
  await expect.poll(() => saved(page), { timeout: 25_000 }).toMatchObject({ 66: 9.3 });
  await expect(page.getByRole('status').filter({ hasText: 'You are signed out' })).toBeHidden();
  await page.getByRole('button', { name: 'Undo' }).click();
  await expect(cell(page, '66.0')).toHaveText('9.64');
});

test('without a line the steps are taken back and done again one by one', async ({ page, context }) => {
  await signInAs(page, 'researcher', LINK);
  await expect(cell(page, '66.0')).toHaveText('9.64');
  const [younger, older] = [await cell(page, '61.3').innerText(), await cell(page, '73.6').innerText()];
  await context.setOffline(true);
  await type(page, '61.3', '8.4');
  await type(page, '66.0', '9.4');
  await type(page, '73.6', '10.4');
  const texts = () => Promise.all(['61.3', '66.0', '73.6'].map((age) => cell(page, age).innerText()));
  await expect.poll(texts).toEqual(['8.4', '9.4', '10.4']);
  await page.getByRole('button', { name: 'Undo' }).click();
  await expect.poll(texts).toEqual(['8.4', '9.4', older]);
  await page.getByRole('button', { name: 'Undo' }).click();
  await page.getByRole('button', { name: 'Redo' }).click();
  await expect.poll(texts).toEqual(['8.4', '9.4', older]);
  for (let i = 0; i < 2; i++) await page.getByRole('button', { name: 'Undo' }).click();
  await expect.poll(texts).toEqual([younger, '9.64', older]);
  await context.setOffline(false);
});

test('the cell under edit stays with its row while rows come and go', async ({ page, browser }) => {
  await signInAs(page, 'researcher', LINK);
  await expect(cell(page, '66.0')).toHaveText('9.64');
  const before = await saved(page);
  await cell(page, '108.0').dblclick();
  await page.getByRole('textbox', { name: 'Angle, °' }).fill('28.8');

  const other = await browser.newContext();
  const theirs = await other.newPage();
  await signInAs(theirs, 'lead', LINK);
  const origin = new URL(page.url()).origin;
  const made = await theirs.request.post(`${API}/rotations`, {
    data: { block: 'sable', relative_to: 'old-harrow', age_ma: 41, pole_lat: 1, pole_lon: 2, angle_deg: 3 },
    headers: { origin, 'if-match': '*' },
  });
  expect(made.status()).toBe(201);
  await expect(cell(page, '41.0')).toHaveText('3.00');
  await page.keyboard.press('Enter');
  await expect.poll(() => saved(page)).toEqual({ ...before, 41: 3, 108: 28.8 });

  // Chosen by its row too: what is typed next goes where the reader sees the frame.
  await cell(page, '66.0').dblclick();
  await page.getByRole('textbox', { name: 'Angle, °' }).fill('9.9');
  const { items } = (await (
    await theirs.request.get(`${API}/rotations?version=draft&block=sable`)
  ).json()) as {
    items: { id: string; age_ma: number }[];
  };
  const row = items.find(({ age_ma }) => age_ma === 66)!;
  await theirs.request.delete(`${API}/rotations/${row.id}`, { headers: { origin, 'if-match': '*' } });
  await expect(page.getByRole('status').filter({ hasText: /Changed by .+ at|no such row/i })).toBeVisible();
  const { 66: _gone, ...rest } = before;
  await expect.poll(() => saved(page)).toEqual({ ...rest, 41: 3, 108: 28.8 });

  await theirs.request.post(`${API}/changes/undo`, { headers: { origin } });
  await theirs.request.post(`${API}/changes/undo`, { headers: { origin } });
  await page
    .getByRole('button', { name: 'Keep theirs' })
    .or(page.getByRole('button', { name: 'Put back' }))
    .click();
  await page.getByRole('button', { name: 'Undo' }).click();
  await expect.poll(() => saved(page)).toEqual(before);
  await other.close();
});
