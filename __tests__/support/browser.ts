import { chromium } from 'playwright-core';
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { serverUrl } from './server';

const FLAGS = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

/** Chromium, with everything that went wrong in its pages. */
export interface Watched {
  readonly browser: Browser;
  /** Console errors, page errors, and answers of 400 and above that no step expected. */
  readonly faults: string[];
  close(): Promise<void>;
}

export async function openBrowser(): Promise<Watched> {
  const browser = await chromium.launch({
    executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium',
    args: FLAGS,
  });
  return { browser, faults: [], close: () => browser.close() };
}

/** A window of one person, signed in by typing into the form. */
export async function signedInWindow(watched: Watched, mailbox: string): Promise<Page> {
  const context: BrowserContext = await watched.browser.newContext({
    viewport: { width: 1280, height: 900 },
    locale: 'en-GB',
    baseURL: serverUrl(),
  });
  const page = await context.newPage();
  page.setDefaultTimeout(20_000);
  page.on('pageerror', (error) => watched.faults.push(`${mailbox}: ${error.message}`));
  page.on('console', (message) => {
    if (message.type() === 'error' && !/status of 4(?:09|22)/.test(message.text()))
      watched.faults.push(`${mailbox}: ${message.text()}`);
  });
  page.on('response', (response) => {
    if (response.status() >= 500 || response.status() === 404)
      watched.faults.push(`${mailbox}: ${response.status()} ${response.url()}`);
  });
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill(`${mailbox}@larkmoor.example`);
  await page.getByLabel('Password').fill('larkmoor-demo');
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.getByRole('navigation', { name: 'Parts' }).waitFor();
  return page;
}

/** Types into a search field and takes the choice of that name. */
export async function choose(page: Page, label: string, name: string): Promise<void> {
  const field = page.getByRole('combobox', { name: label, exact: true });
  await field.click();
  await field.fill(name);
  await page.getByRole('option', { name }).first().click();
}
