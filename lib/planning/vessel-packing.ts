import { requirePositive } from './checks';

/** Up to this many fillings every combination of vessels is tried; beyond it, the largest takes what is more. */
const FILLINGS_TRIED = 6;

export interface VesselFill {
  readonly vesselMl: number;
}

export interface Packing {
  /** One entry per filling, largest first; a vessel may be filled more than once. */
  readonly fills: readonly VesselFill[];
  readonly madeMl: number;
  readonly surplusMl: number;
}

/**
 * Fillings of the room's vessels that hold a volume: the fewest, and among those the least surplus.
 *
 * Vessels are filled to their mark and may be filled again. Least surplus is exact for up to six fillings; for larger
 * volumes the largest vessel is filled until six are left.
 * @param vesselsMl - sizes owned, mL, in any order
 * @throws RangeError if the volume or a size is not positive, or no vessel is owned
 */
export function packIntoVessels(volumeMl: number, vesselsMl: readonly number[]): Packing {
  requirePositive(volumeMl, 'the volume to pack');
  const sizes = [...new Set(vesselsMl)].sort((a, b) => b - a);
  for (const size of sizes) requirePositive(size, 'the size of a vessel');
  const largest = sizes[0];
  if (largest === undefined) throw new RangeError('no vessel is owned');
  const fewest = Math.max(1, Math.ceil(volumeMl / largest - 1e-9));
  const fixed = Math.max(0, fewest - FILLINGS_TRIED);
  const rest = volumeMl - fixed * largest;

  let best: readonly number[] = Array.from({ length: fewest - fixed }, () => largest);
  let bestMl = best.length * largest;
  const tryFrom = (start: number, chosen: readonly number[], sumMl: number) => {
    if (chosen.length === best.length) {
      if (sumMl >= rest - 1e-9 && sumMl < bestMl) [best, bestMl] = [chosen, sumMl];
      return;
    }
    for (let i = start; i < sizes.length; i += 1) {
      const size = sizes[i] as number;
      // Sizes only fall from here: if even this one repeated falls short, so does all that follows.
      if (sumMl + size * (best.length - chosen.length) < rest - 1e-9) return;
      tryFrom(i, [...chosen, size], sumMl + size);
    }
  };
  tryFrom(0, [], 0);
  const fills = [...Array.from({ length: fixed }, () => largest), ...best].map((vesselMl) => ({ vesselMl }));
  const madeMl = fixed * largest + bestMl;
  return { fills, madeMl, surplusMl: madeMl - volumeMl };
}
