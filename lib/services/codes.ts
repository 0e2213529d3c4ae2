import 'server-only';
import { randomBytes } from 'node:crypto';
import { CounterModel } from '@/models/counter';

/** Series of codes people read out: `B` for batches, `Q` for requests, `P` for orders, and so on. */
const SERIES = { request: 'Q', batch: 'B', order: 'P', lot: 'L', jar: 'W' } as const;

/** The next code of a series, such as `B-0042`. Belongs inside a write. */
export async function nextCode(series: keyof typeof SERIES): Promise<string> {
  const [counter] = await CounterModel.findOrCreate({
    where: { name: series },
    defaults: { name: series, value: 0 },
  });
  counter.value += 1;
  await counter.save();
  return `${SERIES[series]}-${String(counter.value).padStart(4, '0')}`;
}

/** 160 random bits for addresses and letters that must not be guessed. */
export function randomToken(): string {
  return randomBytes(20).toString('base64url');
}
