import { readFileSync } from 'node:fs';
import path from 'node:path';

interface Served {
  readonly app: string;
  readonly standIns: string;
  readonly dataDir: string;
}

const FILE = path.join(process.cwd(), 'test-output', 'served.json');

/** What global-setup started for this run. */
export function served(): Served {
  return JSON.parse(readFileSync(FILE, 'utf8')) as Served;
}
export const serverUrl = (): string => served().app;
export const standInUrl = (): string => served().standIns;
export { FILE as SERVED_FILE };
