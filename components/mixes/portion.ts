import type { MixPreviewBody } from '@/lib/schemas/mixes';

/** A portion on the bench: what is in the bottle, and how much is poured. */
export interface BenchPortion {
  readonly key: string;
  readonly label: string;
  /** Set where it is a saved recipe. */
  readonly solutionId: string | null;
  readonly solutes: readonly { readonly substance: string; readonly molarity: number }[];
  readonly volumeMl: number;
}

let made = 0;
export function newPortion(part: Omit<BenchPortion, 'key'>): BenchPortion {
  made += 1;
  return { key: `portion-${made}`, ...part };
}

export function previewBody(portions: readonly BenchPortion[]): Pick<MixPreviewBody, 'portions'> {
  return {
    portions: portions.map(({ label, solutes, volumeMl }) => ({
      label,
      solutes: solutes.map((solute) => ({ ...solute })),
      volumeMl,
    })),
  };
}
