import { spawn } from 'node:child_process';
import type { ChildProcess } from 'node:child_process';
import { mkdirSync, mkdtempSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import type { AddressInfo } from 'node:net';
import os from 'node:os';
import path from 'node:path';
import { SERVED_FILE } from './server';

declare global {
  var benchwrightTestRun: { child: ChildProcess; dataDir: string } | undefined;
}

const READY_WITHIN_MS = 90_000;

/** Three ports in a row that are free now: the app's and those of its stand-ins. */
async function freePorts(): Promise<number> {
  for (;;) {
    const probe = createServer();
    const port = await new Promise<number>((resolve) => {
      probe.listen(0, '127.0.0.1', () => resolve((probe.address() as AddressInfo).port));
    });
    await new Promise((resolve) => probe.close(resolve));
    if (port < 65_000) return port;
  }
}

/** Serves the built app with a freshly seeded house in a folder of its own. */
export default async function globalSetup(): Promise<void> {
  const port = await freePorts();
  const dataDir = mkdtempSync(path.join(os.tmpdir(), 'benchwright-test-'));
  const child: ChildProcess = spawn(
    process.execPath,
    [
      '-e',
      "require('./scripts/lib/serve.js').serveHouse('start').catch((e) => { console.error(e); process.exit(1); })",
    ],
    {
      stdio: ['ignore', 'ignore', 'inherit'],
      env: {
        ...process.env,
        NODE_ENV: 'production',
        PORT: String(port),
        DATA_DIR: dataDir,
        RATE_LIMITS: 'relaxed',
        LOG_LEVEL: 'error',
        BASE_URL: `http://localhost:${port}`,
      },
    },
  );
  globalThis.benchwrightTestRun = { child, dataDir };
  const app = `http://localhost:${port}`;
  mkdirSync(path.dirname(SERVED_FILE), { recursive: true });
  writeFileSync(SERVED_FILE, JSON.stringify({ app, standIns: `http://127.0.0.1:${port + 2}`, dataDir }));
  const until = Date.now() + READY_WITHIN_MS;
  for (;;) {
    const response = await fetch(`${app}/api/health`).catch(() => null);
    if (response?.ok) return;
    if (child.exitCode !== null || Date.now() > until)
      throw new Error('The server for the tests did not start');
    await new Promise((resolve) => setTimeout(resolve, 250));
  }
}
