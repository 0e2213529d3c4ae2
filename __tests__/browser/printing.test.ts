import { execFileSync } from 'node:child_process';
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import jsQR from 'jsqr';
import { PNG } from 'pngjs';
import type { Page } from 'playwright-core';
import { openBrowser, signedInWindow } from '../support/browser';
import type { Watched } from '../support/browser';
import { makeBottledBatch } from '../support/bottled-batch';
import { serverUrl } from '../support/server';

/** What is printed is looked at as a camera would: PDF, then pixels, then a decoder that knows nothing of us. */
const DOTS_PER_INCH = 200;
/** A square with less ink than this holds no code; searching it would only take time. */
const LEAST_INK = 0.04;

let watched: Watched;
let prep: Page;
let folder: string;

beforeAll(async () => {
  folder = mkdtempSync(path.join(os.tmpdir(), 'benchwright-print-'));
  watched = await openBrowser();
  prep = await signedInWindow(watched, 'prep');
}, 60_000);

afterAll(async () => {
  await watched.close();
  rmSync(folder, { recursive: true, force: true });
});

interface Box {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

function crop(image: PNG, { x, y, width, height }: Box): PNG {
  const part = new PNG({ width, height });
  PNG.bitblt(image, part, x, y, width, height, 0, 0);
  return part;
}

function inkOf({ data }: PNG): number {
  let dark = 0;
  for (let at = 0; at < data.length; at += 4) if ((data[at] ?? 255) < 128) dark += 1;
  return dark / (data.length / 4);
}

/**
 * Every code found on a page that is searched in overlapping squares, since the decoder finds one at a time; the
 * search ends when all that are looked for were found.
 */
function codesOn(image: PNG, wanted: readonly string[]): Set<string> {
  const found = new Set<string>();
  const size = Math.round(DOTS_PER_INCH * 1.8);
  const step = Math.round(size / 3);
  for (let y = 0; y < image.height; y += step) {
    for (let x = 0; x < image.width; x += step) {
      const width = Math.min(size, image.width - x);
      const part = crop(image, { x, y, width, height: Math.min(size, image.height - y) });
      if (inkOf(part) < LEAST_INK) continue;
      const code = jsQR(new Uint8ClampedArray(part.data), part.width, part.height);
      if (code) found.add(code.data);
      if (wanted.every((text) => found.has(text))) return found;
    }
  }
  return found;
}

async function printed(page: Page, name: string, wanted: readonly string[]): Promise<Set<string>> {
  const file = path.join(folder, `${name}.pdf`);
  writeFileSync(file, await page.pdf({ preferCSSPageSize: true, format: 'A4' }));
  execFileSync('pdftoppm', ['-r', String(DOTS_PER_INCH), '-png', file, path.join(folder, name)]);
  const pages = readdirSync(folder).filter((entry) => entry.startsWith(name) && entry.endsWith('.png'));
  expect(pages.length).toBeGreaterThan(0);
  return new Set(
    pages.flatMap((entry) => [...codesOn(PNG.sync.read(readFileSync(path.join(folder, entry))), wanted)]),
  );
}

test('a printed batch sheet and label sheet carry codes that decode to the right addresses', async () => {
  const { batchId, bottles } = await makeBottledBatch();
  expect(bottles.length).toBeGreaterThan(0);

  await prep.goto(`/batches/${batchId}`);
  const sheet = `${serverUrl()}/batches/${batchId}`;
  expect(await printed(prep, 'sheet', [sheet])).toContain(sheet);

  await prep.goto(`/batches/${batchId}/labels`);
  await prep.locator('[data-label]').first().waitFor();
  const addresses = bottles.map(({ address }) => address);
  const labels = await printed(prep, 'labels', addresses);
  for (const { address } of bottles) expect(labels).toContain(address);

  const [first] = bottles;
  if (!first) throw new Error('The batch has no bottle');
  const stranger = await watched.browser.newPage();
  const answer = await stranger.goto(first.address);
  expect(answer?.status()).toBe(200);
  await stranger.getByText('What to do first').waitFor();
}, 180_000);
