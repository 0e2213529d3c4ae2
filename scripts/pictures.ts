import { mkdirSync } from 'node:fs';
import path from 'node:path';
import { chromium } from 'playwright-core';

/**
 * Takes the pictures of README.md from a running demo: `npm start` in one window, `npm run pictures` in another.
 */
const BASE = process.env.BASE_URL ?? `http://localhost:${process.env.PORT ?? 3000}`;
const FOLDER = path.join('docs', 'pictures');
const SIZE = { width: 1280, height: 860 };

const PICTURES: readonly (readonly [name: string, mailbox: string, open: string | RegExp, at: string])[] = [
  ['today', 'prep', '', '/'],
  ['review', 'safety', /^Q-\d+: /, '/reviews'],
  ['request', 'instructor', /^Q-0001$/, '/requests'],
  ['batches', 'prep', '', '/batches'],
  ['shelves', 'prep', '', '/shelves'],
];

async function main(): Promise<void> {
  mkdirSync(FOLDER, { recursive: true });
  const browser = await chromium.launch({
    executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium',
    args: ['--no-sandbox', '--disable-gpu'],
  });
  for (const [name, mailbox, open, at] of PICTURES) {
    const context = await browser.newContext({ baseURL: BASE, viewport: SIZE, locale: 'en-GB' });
    const password = process.env.DEMO_PASSWORD ?? 'larkmoor-demo';
    await context.request.post('/api/session', { data: { email: `${mailbox}@larkmoor.example`, password } });
    const page = await context.newPage();
    await page.goto(at, { waitUntil: 'networkidle' });
    if (open !== '') {
      await page.getByRole('link', { name: open }).first().click();
      await page.waitForURL(/[0-9a-f-]{36}$/);
      await page.waitForLoadState('networkidle');
    }
    await page.screenshot({ path: path.join(FOLDER, `${name}.png`) });
    await context.close();
    console.log(`${name}.png`);
  }
  await browser.close();
}

main().catch((error: unknown) => {
  console.error(error);
  process.exitCode = 1;
});
