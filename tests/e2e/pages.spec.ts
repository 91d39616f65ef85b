/** Every page: accessible by axe in both themes, nothing wider than the window at 360 px. */
import { DEMO, expect, expectAccessible, signInAs, test } from './support';

const PUBLIC = [
  '/',
  '/sign-in',
  '/sign-up',
  '/reset',
  '/released',
  '/methods',
  '/docs/api',
  DEMO,
  `${DEMO}/workbench?age=62.4&block=sable`,
  `${DEMO}/print?age_ma=62.4`,
  `${DEMO}/versions`,
  `${DEMO}/sources`,
  '/nowhere',
];
const OWN = [
  '/projects',
  '/projects/new',
  '/account',
  `${DEMO}/import`,
  `${DEMO}/team`,
  `${DEMO}/history`,
  `${DEMO}/settings`,
];

for (const theme of ['light', 'dark'] as const) {
  test(`pages for everyone, ${theme}`, async ({ page, baseURL }) => {
    test.setTimeout(180_000);
    await page.context().addCookies([{ name: 'theme', value: theme, url: baseURL! }]);
    for (const path of PUBLIC) {
      await page.goto(path);
      await expect(page.locator('html')).toHaveAttribute('data-theme', theme);
      await page.waitForLoadState('networkidle').catch(() => undefined);
      await expectAccessible(page);
    }
  });

  test(`pages of the team, ${theme}`, async ({ page, baseURL }) => {
    test.setTimeout(180_000);
    await page.context().addCookies([{ name: 'theme', value: theme, url: baseURL! }]);
    await signInAs(page, 'lead');
    for (const path of OWN) {
      await page.goto(path);
      await expectAccessible(page);
    }
  });
}

test('at 360 px nothing is wider than the window', async ({ page }) => {
  test.setTimeout(180_000);
  await page.setViewportSize({ width: 360, height: 780 });
  await signInAs(page, 'lead');
  for (const path of [...PUBLIC, ...OWN]) {
    await page.goto(path);
    expect(await page.evaluate(() => document.documentElement.scrollWidth), path).toBeLessThanOrEqual(360);
  }
});

for (const [path, island] of [
  ['/', 'LandingLog'],
  ['/', 'LandingGlobe'],
  [DEMO, 'OverviewGlobe'],
  [DEMO, 'EvidenceByBlock'],
] as const) {
  test(`${path}: ${island} may arrive after the outlines and takes over the markup as it stands`, async ({
    page,
  }) => {
    let outlines = 0;
    page.on('response', (answer) => (outlines += answer.url().includes('/geometry') ? 1 : 0));
    const early = page.waitForResponse(/\/geometry/);
    await page.route(new RegExp(`/_astro/${island}\\.`), async (route) => {
      await early;
      await new Promise((later) => setTimeout(later, 1_500));
      await route.continue();
    });
    await page.goto(path);
    await expect(page.locator(`astro-island[component-url*="${island}"]`)).not.toHaveAttribute('ssr');
    expect(outlines).toBeGreaterThan(0);
  });
}
