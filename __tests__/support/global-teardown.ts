import { rmSync } from 'node:fs';

export default async function globalTeardown(): Promise<void> {
  const run = globalThis.benchwrightTestRun;
  if (!run) return;
  const ended = new Promise((resolve) => run.child.once('exit', resolve));
  run.child.kill('SIGTERM');
  await ended;
  rmSync(run.dataDir, { recursive: true, force: true });
}
