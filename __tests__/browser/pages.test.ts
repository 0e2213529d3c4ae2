import { readFileSync } from 'node:fs';
import type { AxeResults } from 'axe-core';
import type { Page } from 'playwright-core';
import { openBrowser, signedInWindow } from '../support/browser';
import type { Watched } from '../support/browser';

/** What each role opens in a day; every page is looked at on a desk and on a phone, light and dark. */
const PAGES: Readonly<Record<string, readonly string[]>> = {
  instructor: [
    '/',
    '/sessions',
    '/sessions/new',
    '/requests',
    '/requests/new',
    '/mix-bench',
    '/catalogue',
    '/account',
  ],
  prep: [
    '/',
    '/batches',
    '/shelves',
    '/shelves/lots',
    '/orders',
    '/orders/shortages',
    '/catalogue/solutions',
    '/catalogue/substances/silver-nitrate',
  ],
  purchasing: ['/', '/orders', '/orders/new', '/outgoing'],
  safety: ['/', '/reviews', '/records', '/catalogue/species'],
  admin: ['/', '/accounts', '/records', '/outgoing'],
};
const AXE = readFileSync(require.resolve('axe-core/axe.min.js'), 'utf8');
const LOOKS = [
  { width: 1280, height: 900, colorScheme: 'light' },
  { width: 390, height: 844, colorScheme: 'dark' },
] as const;

let watched: Watched;
beforeAll(async () => {
  watched = await openBrowser();
});
afterAll(async () => {
  await watched.close();
});

/** Violations of WCAG 2.2 A and AA, each with the first element it was seen on. */
async function violations(page: Page): Promise<string[]> {
  await page.evaluate(AXE);
  const results = (await page.evaluate(
    "axe.run({ runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'] })",
  )) as AxeResults;
  return results.violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.target.join(' ')} (${nodes.length})`);
}

test.each(Object.entries(PAGES))(
  '%s: every page opens without a fault, fits the screen, and has one heading and no accessibility violation',
  async (role, paths) => {
    const page = await signedInWindow(watched, role);
    const wrong: string[] = [];
    for (const { width, height, colorScheme } of LOOKS) {
      await page.setViewportSize({ width, height });
      await page.emulateMedia({ colorScheme, reducedMotion: 'reduce' });
      for (const path of paths) {
        await page.goto(path, { waitUntil: 'networkidle' });
        const at = `${path} at ${width}`;
        const overflow = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
        if (overflow > 0) wrong.push(`${at}: ${overflow} px too wide`);
        const headings = await page.getByRole('heading', { level: 1 }).count();
        if (headings !== 1) wrong.push(`${at}: ${headings} first headings`);
        wrong.push(...(await violations(page)).map((violation) => `${at}: ${violation}`));
      }
    }
    expect(wrong).toEqual([]);
    expect(watched.faults).toEqual([]);
  },
  180_000,
);
