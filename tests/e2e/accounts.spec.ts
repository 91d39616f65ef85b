import { DEMO, expect, ownProject, signInAs, test, type DemoRole } from './support';

for (const [role, name] of [
  ['lead', 'Mara Kell'],
  ['researcher', 'Tobin Ashgrove'],
  ['reviewer', 'Ines Harrowgate'],
  ['instructor', 'Bram Teasdale'],
  ['admin', 'Wilma Oake'],
] as const satisfies readonly (readonly [DemoRole, string])[]) {
  test(`signs in and out as ${role}`, async ({ page }) => {
    await signInAs(page, role);
    await page.locator('details.cell summary', { hasText: name }).click();
    await expect(page.getByText(`${name.toLowerCase().replace(' ', '.')}@lantern.example`)).toBeVisible();
    await page.getByRole('button', { name: 'Sign out' }).click();
    await page.goto('/account');
    await expect(page).toHaveURL(/\/sign-in/);
  });
}

test('a wrong password is said at the form, and what was typed stays', async ({ page }) => {
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill('mara.kell@lantern.example');
  await page.getByLabel('Password', { exact: true }).fill('not this one');
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await expect(page.getByRole('alert')).toContainText('E-mail and password do not match');
  await expect(page.getByLabel('E-mail')).toHaveValue('mara.kell@lantern.example');
});

test('a forgotten password is set anew by the link in the outbox', async ({ page }) => {
  await page.goto('/sign-up');
  await page.getByLabel('Name, as others see it').fill('Runa Holt');
  await page.getByLabel('E-mail').fill('runa.holt@example.org');
  await page.getByLabel('Password', { exact: true }).fill('first password 1');
  await page.getByRole('button', { name: 'Make the account' }).click();
  await page.waitForURL('**/projects');
  await page.context().clearCookies();

  await page.goto('/reset');
  await page.getByLabel('E-mail').fill('runa.holt@example.org');
  await page.getByRole('button', { name: 'Send the link' }).click();
  await expect(page.getByRole('status')).toContainText('on its way');

  await signInAs(page, 'admin', '/admin');
  await page.locator('summary', { hasText: 'runa.holt@example.org' }).first().click();
  const link = await page
    .getByRole('link', { name: /\/reset\// })
    .first()
    .getAttribute('href');
  await page.context().clearCookies();
  await page.goto(link!);
  await page.getByLabel('New password').fill('second password 2');
  await page.getByRole('button', { name: 'Set the password' }).click();
  await expect(page.getByText('The new password is set')).toBeVisible();
  await page.getByLabel('E-mail').fill('runa.holt@example.org');
  await page.getByLabel('Password', { exact: true }).fill('second password 2');
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await page.waitForURL('**/projects');
});

test('another team’s project is not to be found', async ({ page, browser }) => {
  const slug = 'theirs-alone';
  const theirs = await browser.newContext();
  const owner = await theirs.newPage();
  await ownProject(owner, slug);
  const places = [`/projects/${slug}`, `/projects/${slug}/workbench`, `/api/projects/${slug}`, `/api/projects/${slug}/blocks`, `/api/projects/${slug}/motions?version=draft`]; // prettier-ignore
  for (const place of places) expect((await owner.request.get(place)).status(), place).toBe(200);

  for (const standing of ['visitor', 'member of another team']) {
    if (standing !== 'visitor') await ownProject(page, 'mine-alone');
    for (const place of places)
      expect((await page.request.get(place)).status(), `${place} as ${standing}`).toBe(404);
    const shown = await page.goto(`/projects/${slug}/workbench`);
    expect(shown!.status()).toBe(404);
    await expect(page.getByRole('heading', { name: 'Nothing here' })).toBeVisible();
    await expect(page.getByText('Two blocks')).toHaveCount(0);
    const origin = new URL(page.url()).origin;
    const gone = await page.request.delete(`/api/projects/${slug}`, { headers: { origin } });
    expect(gone.status()).toBe(404);
  }
  await page.goto('/projects');
  await expect(page.getByRole('link', { name: 'Two blocks' })).toHaveCount(1);
  expect((await owner.request.get(`/api/projects/${slug}`)).status()).toBe(200);
  await theirs.close();
});

test('a page for another role says which it takes, and leads back', async ({ page }) => {
  await signInAs(page, 'reviewer');
  await page.goto(`${DEMO}/settings`);
  await expect(page.getByText('This takes the role lead; yours is reviewer.')).toBeVisible();
  await page.getByRole('link', { name: 'Back to the project' }).click();
  await expect(page).toHaveURL(DEMO);
  await page.goto(`${DEMO}/workbench?version=77`);
  await expect(page.getByText('The project has no version 77 that you can see.')).toBeVisible();
});

test('an instructor sees no way to edit, and is told why', async ({ page }) => {
  await signInAs(page, 'instructor', `${DEMO}/workbench`);
  await expect(page.getByRole('region', { name: 'Ledger' }).or(page.getByLabel('Ledger'))).toContainText(
    'read only',
  );
});
