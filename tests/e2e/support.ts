/** What every browser test shares: a page whose console errors fail the test, signing in, the axe check. */
import AxeBuilder from '@axe-core/playwright';
import { test as base, expect, type Locator, type Page } from '@playwright/test';

export const test = base.extend<{ page: Page }>({
  page: async ({ page }, use) => {
    const errors: string[] = [];
    page.on('console', (message) => {
      if (message.type() === 'error') errors.push(message.text());
    });
    page.on('pageerror', (error) => errors.push(String(error)));
    await use(page);
    // A refused form answers 4xx on purpose, and a test takes the network away on purpose: the browser reports both.
    const unexpected = errors.filter(
      (text) =>
        !/Failed to load resource: (the server responded with a status of 4\d\d|net::ERR_(INTERNET_DISCONNECTED|CONNECTION_RESET))/.test(
          text,
        ),
    );
    expect(unexpected).toEqual([]);
  },
});

export { expect };

export type DemoRole = 'lead' | 'researcher' | 'reviewer' | 'instructor' | 'admin';
export const DEMO = '/projects/lantern-sea';

/** Signs in as one of the demo's people, by the button on the sign-in page. */
export async function signInAs(page: Page, role: DemoRole, next = '/projects'): Promise<void> {
  await page.goto(`/sign-in?next=${encodeURIComponent(next)}`);
  const name = role === 'admin' ? /site admin$|, admin$/ : new RegExp(`, ${role}$`);
  await page.getByRole('button', { name }).click();
  await page.waitForURL((url) => url.pathname === next.split('?')[0]);
}

/** Presses Tab until the focus is on an element or within it. */
export async function tabTo(page: Page, target: Locator, most = 80): Promise<void> {
  for (let i = 0; i < most; i++) {
    await page.keyboard.press('Tab');
    if (await target.evaluate((element) => element.contains(document.activeElement))) return;
  }
  throw new Error(`not reached by ${most} presses of Tab: ${String(target)}`);
}

/** WCAG 2.2 A and AA by axe. */
export async function expectAccessible(page: Page, except: readonly string[] = []): Promise<void> {
  const builder = new AxeBuilder({ page })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'])
    .disableRules([...except]);
  const { violations } = await builder.analyze();
  const found = violations.map(
    (v) =>
      `${v.id}: ${v.nodes
        .map((n) => n.target.join(' '))
        .slice(0, 4)
        .join(' | ')}`,
  );
  expect(found).toEqual([]);
}

/** An account and an empty project of its own, for tests that change things. */
export async function ownProject(page: Page, slug: string): Promise<void> {
  await page.goto('/sign-up');
  await page.getByLabel('Name, as others see it').fill('Ada Thorne');
  await page.getByLabel('E-mail').fill(`ada.${slug}@example.org`);
  await page.getByLabel('Password', { exact: true }).fill('gneiss over schist');
  await page.getByRole('button', { name: 'Make the account' }).click();
  await page.waitForURL('**/projects');
  await page.goto('/projects/new');
  await page.getByLabel('Title').fill('Two blocks');
  await page.getByLabel('Address').fill(slug);
  await page.getByRole('button', { name: 'Start the project' }).click();
  await page.waitForURL(`**/projects/${slug}/import`);
}
