import { addDays, format, isWeekend } from 'date-fns';
import type { Page } from 'playwright-core';
import { choose, openBrowser, signedInWindow } from '../support/browser';
import type { Watched } from '../support/browser';
import { standInUrl } from '../support/server';

/** The next working day from so many days ahead: sessions are not held at weekends. */
function workingDay(ahead: number): Date {
  let day = addDays(new Date(), ahead);
  while (isWeekend(day)) day = addDays(day, 1);
  return day;
}

let watched: Watched;
let instructor: Page;
let prep: Page;
let purchasing: Page;
let safety: Page;

beforeAll(async () => {
  watched = await openBrowser();
  instructor = await signedInWindow(watched, 'instructor');
  prep = await signedInWindow(watched, 'prep');
  purchasing = await signedInWindow(watched, 'purchasing');
  safety = await signedInWindow(watched, 'safety');
}, 120_000);

afterAll(async () => {
  await watched.close();
});

/** Makes a session by the form and leaves the browser on its page. */
async function makeSession(page: Page, title: string, day: Date, benches: number): Promise<void> {
  await page.goto('/sessions/new');
  await page.getByLabel('Course').fill('CH 299');
  await page.getByLabel('Title').fill(title);
  await page.getByLabel('Starts').fill(`${format(day, 'yyyy-MM-dd')}T18:00`);
  await page.getByLabel('Ends').fill(`${format(day, 'yyyy-MM-dd')}T19:30`);
  await page.getByLabel('Room').selectOption({ label: 'Laboratory 2 (10 benches)' });
  await page.getByLabel('Benches').fill(String(benches));
  await page.getByRole('button', { name: 'Make the session' }).click();
  await page.getByRole('heading', { level: 1, name: `CH 299 ${title}` }).waitFor();
}

async function fillSolution(page: Page, number: number, name: string, perBenchMl: number): Promise<void> {
  await choose(page, `Solution ${number}`, name);
  await page
    .getByLabel('Per bench')
    .nth(number - 1)
    .fill(String(perBenchMl));
}

const codeOf = async (page: Page) =>
  /Q-\d{4}/.exec(await page.getByRole('heading', { level: 1 }).innerText())?.[0] ?? '';

/** Plans, makes, checks and bottles one needed solution by the sheet. @returns the path of its sheet */
async function makeBatch(page: Page, solution: string, requestCode: string): Promise<string> {
  await page.goto('/batches');
  await page
    .getByRole('listitem')
    .filter({ hasText: solution })
    .filter({ hasText: requestCode })
    .getByRole('button', { name: `Plan batch of ${solution}` })
    .click();
  await page.getByRole('button', { name: 'Plan this batch' }).click();
  await page.waitForURL(/\/batches\/[0-9a-f-]{36}$/);
  const sheet = new URL(page.url()).pathname;
  await page.getByRole('button', { name: 'Start making' }).click();
  const entries = page.getByLabel(/^Taken, line \d+$/);
  await entries.first().waitFor();
  for (let line = 0; line < (await entries.count()); line += 1) {
    const entry = page.getByLabel(`Taken, line ${line + 1}`, { exact: true });
    const row = page.getByRole('listitem').filter({ has: entry });
    const target = (await row.locator('p.text-xl').first().innerText()).replace(/[^\d.]/g, '');
    await entry.fill(target);
    await page.getByRole('button', { name: `Save line ${line + 1}` }).click();
    await row.getByText('within what is allowed').waitFor();
  }
  const steps = page.getByRole('checkbox');
  for (let step = 0; step < (await steps.count()); step += 1) {
    await steps.nth(step).click();
    await page.getByRole('checkbox', { checked: true }).nth(step).waitFor();
  }
  await page.getByRole('button', { name: 'Mark as checked' }).click();
  await page.getByRole('button', { name: 'Fill these bottles' }).click();
  await page.getByRole('button', { name: `Hand over to ${requestCode}` }).waitFor();
  return sheet;
}

async function stockMicroOf(page: Page, substanceId: string): Promise<number> {
  await page.goto(`/catalogue/substances/${substanceId}`);
  const text = await page
    .getByRole('definition')
    .filter({ hasText: /^[\d.]+ (g|mL)$/ })
    .first()
    .innerText();
  return Math.round(Number.parseFloat(text) * 1e6);
}

test('(a) a copper(II)-ammonia demonstration is agreed at once, made, labelled and handed over; its missing reagent goes from shortage to shelf', async () => {
  // Ask.
  await makeSession(instructor, 'Copper ammine evening', workingDay(6), 6);
  await instructor.getByRole('link', { name: 'Ask for this session' }).click();
  await fillSolution(instructor, 1, 'Nickel(II) sulfate 0.1 mol/L', 50);
  await instructor.getByRole('button', { name: 'Add a demonstration' }).click();
  await choose(instructor, 'Demonstration 2', 'Copper hydroxide to deep blue ammine');
  await instructor.getByText(/Agreed at once when you submit/).waitFor();
  await instructor
    .getByRole('complementary', { name: 'What it will do' })
    .getByText(/^deep blue/)
    .waitFor();
  await instructor.getByRole('button', { name: 'Submit the request' }).click();
  await instructor.waitForURL(/\/requests\/[0-9a-f-]{36}$/);
  await instructor.getByText('agreed', { exact: true }).first().waitFor();
  const code = await codeOf(instructor);
  expect(code).toMatch(/^Q-\d{4}$/);
  const requestPath = new URL(instructor.url()).pathname;

  // The nickel is short: planning it says so, and purchasing sees it.
  await prep.goto('/batches');
  await prep
    .getByRole('listitem')
    .filter({ hasText: 'Nickel(II) sulfate 0.1 mol/L' })
    .filter({ hasText: code })
    .getByRole('button', { name: /^Plan batch of Nickel/ })
    .click();
  await prep.getByRole('button', { name: 'Plan this batch' }).click();
  await prep.getByText('Not enough in stock').waitFor();

  // Draft by prep; approval, sending and payment by purchasing.
  const before = await stockMicroOf(prep, 'nickel-sulfate');
  await prep.goto('/orders/shortages');
  await prep
    .getByRole('link', { name: /nickel\(II\) sulfate/ })
    .first()
    .waitFor();
  await prep.getByRole('button', { name: 'Draft this order' }).first().click();
  await prep.waitForURL(/\/orders\/[0-9a-f-]{36}$/);
  const orderPath = new URL(prep.url()).pathname;
  expect(await prep.getByRole('button', { name: /^Approve/ }).count()).toBe(0);
  await prep.getByRole('button', { name: 'Put up for approval' }).click();
  await prep.getByText('for approval', { exact: true }).first().waitFor();

  await purchasing.goto(orderPath);
  const orderCode =
    /P-\d{4}/.exec(await purchasing.getByRole('heading', { level: 1 }).innerText())?.[0] ?? '';
  await purchasing.getByRole('button', { name: /^Approve/ }).click();
  await purchasing.getByRole('button', { name: 'Send to the supplier' }).click();
  await purchasing.locator('main header').getByText('acknowledged').waitFor();
  await purchasing.getByRole('button', { name: /^Pay/ }).click();
  await purchasing.getByText(/^yes, pi_/).waitFor();
  const letters = (await (await fetch(`${standInUrl()}/mail/messages.json`)).json()) as {
    subject: string;
    to: string;
  }[];
  expect(letters.some(({ subject }) => subject.includes(orderCode))).toBe(true);

  // Received as a lot: stock rises.
  await prep.goto(orderPath);
  await prep.getByLabel('Lot number').fill('NK-2201');
  await prep.getByLabel('Assay on the certificate').fill('99.1');
  await prep.getByLabel('Place').selectOption({ label: 'Poisons cupboard (toxic)' });
  await prep.getByRole('button', { name: 'Take it in' }).click();
  await prep
    .getByText(/1 of 1/)
    .first()
    .waitFor();
  const after = await stockMicroOf(prep, 'nickel-sulfate');
  expect(after).toBeGreaterThan(before);

  // Make all three, hand over.
  const sheets = [];
  for (const solution of ['Nickel(II) sulfate 0.1 mol/L', 'Copper(II) sulfate 0.1 mol/L', 'Ammonia 2 mol/L'])
    sheets.push(await makeBatch(prep, solution, code));
  expect(await stockMicroOf(prep, 'nickel-sulfate')).toBeLessThan(after);
  await instructor.goto(requestPath);
  await instructor.getByText('ready', { exact: true }).first().waitFor();
  for (const sheet of sheets) {
    await prep.goto(sheet);
    await prep.getByRole('button', { name: `Hand over to ${code}` }).click();
    await prep.getByRole('table', { name: 'Bottles' }).getByText('handed over').first().waitFor();
  }
  await instructor.goto(requestPath);
  await instructor.getByText('handed over', { exact: true }).first().waitFor();
  expect(watched.faults).toEqual([]);
}, 240_000);

test('(b) a silver-cyanide demonstration beside a dilute acid goes to safety with the HCN it could give; only an officer can judge it', async () => {
  await makeSession(instructor, 'Silver and cyanide', workingDay(8), 4);
  await instructor.getByRole('link', { name: 'Ask for this session' }).click();
  await fillSolution(instructor, 1, 'Hydrochloric acid 0.1 mol/L', 20);
  await instructor.getByRole('button', { name: 'Add a demonstration' }).click();
  await choose(instructor, 'Demonstration 2', 'Silver into its cyanide complex');
  await instructor.getByText(/Goes to the safety officer|Must not be made here/).waitFor();
  await instructor.getByText('HCN gas').first().waitFor();
  await instructor.getByRole('button', { name: 'Submit the request' }).click();
  await instructor.waitForURL(/\/requests\/[0-9a-f-]{36}$/);
  await instructor.getByText('in review', { exact: true }).first().waitFor();
  const code = await codeOf(instructor);

  // The instructor sees the case but can't judge it, nor open an order.
  await instructor.getByRole('link', { name: 'Open the case' }).click();
  await instructor.getByRole('heading', { level: 1, name: `May ${code} be done here?` }).waitFor();
  await instructor.getByText('HCN gas').first().waitFor();
  for (const name of ['Agree', 'Agree with conditions', 'Refuse'])
    expect(await instructor.getByRole('button', { name, exact: true }).count()).toBe(0);
  const casePath = new URL(instructor.url()).pathname;
  const judged = await instructor.request.post(`/api/reviews/${casePath.split('/').at(-1)}/decision`, {
    data: { verdict: 'agreed', text: '', version: 0, password: 'larkmoor-demo' },
  });
  expect(judged.status()).toBe(403);
  const orders = await instructor.goto('/orders');
  expect(orders?.status()).toBe(403);

  // The officer agrees with conditions, signed by password; a wrong one is refused beside the field.
  await safety.goto('/reviews');
  await safety.getByLabel('Request code').fill(code);
  await safety.waitForURL(/search=/);
  await safety.getByRole('link', { name: new RegExp(code) }).click();
  await safety.getByText(/mmol/).first().waitFor();
  await safety.getByRole('button', { name: 'Agree with conditions' }).click();
  await safety
    .getByLabel('Conditions, one a line')
    .fill('No acid in the room until the cyanide has left it.\nTwo trained people present.');
  await safety.getByLabel('Your password, as signature').fill('not the password');
  await safety.getByRole('button', { name: 'Sign', exact: true }).click();
  await safety.getByText('The password is not right.').waitFor();
  await safety.getByLabel('Your password, as signature').fill('larkmoor-demo');
  await safety.getByRole('button', { name: 'Sign', exact: true }).click();
  await safety.getByText(/^✓ agreed with conditions by/).waitFor();

  // The conditions stand on the batch sheet as lines to be ticked.
  await prep.goto('/batches');
  await prep
    .getByRole('listitem')
    .filter({ hasText: 'Sodium cyanide 0.1 mol/L in alkali' })
    .filter({ hasText: code })
    .getByRole('button', { name: /^Plan batch of Sodium cyanide/ })
    .click();
  await prep.getByRole('button', { name: 'Plan this batch' }).click();
  await prep.waitForURL(/\/batches\/[0-9a-f-]{36}$/);
  await prep.getByText('No acid in the room until the cyanide has left it.').waitFor();
  expect(watched.faults.filter((fault) => !fault.includes('status of 403'))).toEqual([]);
}, 180_000);
