import 'server-only';
import { RateLimiterMemory, RateLimiterRes } from 'rate-limiter-flexible';
import { environment } from '@/lib/config/env';
import { DomainError } from '@/lib/domain/errors';

/** Calls allowed a minute: dragging a volume makes several a second; guessing a password should not. */
const PER_MINUTE = { light: 1200, heavy: 600, guess: 20 } as const;
export type Cost = keyof typeof PER_MINUTE;

const shared = globalThis as typeof globalThis & {
  benchwrightLimits?: Partial<Record<Cost, RateLimiterMemory>>;
};

function limiter(cost: Cost): RateLimiterMemory {
  const limits = (shared.benchwrightLimits ??= {});
  const factor = environment().RATE_LIMITS === 'relaxed' ? 50 : 1;
  return (limits[cost] ??= new RateLimiterMemory({ points: PER_MINUTE[cost] * factor, duration: 60 }));
}

/** @throws DomainError `too-many-requests` once a caller has used up a minute's calls */
export async function countCall(cost: Cost, caller: string): Promise<void> {
  try {
    await limiter(cost).consume(`${cost}:${caller}`);
  } catch (cause) {
    if (!(cause instanceof RateLimiterRes)) throw cause;
    throw new DomainError('too-many-requests', 'Too many calls in a minute. Wait a little and go on.', {
      retryAfterSeconds: Math.ceil(cause.msBeforeNext / 1000),
    });
  }
}
