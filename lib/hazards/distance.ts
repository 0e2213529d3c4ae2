import { pourMix } from '../chemistry/mixing';
import { gravityOf } from '../domain/gravity';
import { decide, screenMix } from './screen';
import type { BottleContent, Decision, Finding, Room } from './types';

/** How much of one thing it takes until the decision about a mix becomes `review` or `stop`. */
export interface Distance {
  /** What is added. */
  readonly label: string;
  /** mL; null where even the most tried crosses nothing. */
  readonly volumeMl: number | null;
  readonly decision: Decision | null;
  readonly finding: Finding | null;
}

/** What stands in every laboratory. */
export const STANDARD_SUSPECTS: readonly BottleContent[] = [
  { label: '1 mol/L strong acid', volumeMl: 1, solutes: [{ substance: 'hydrochloric-acid', molarity: 1 }] },
  { label: '1 mol/L strong base', volumeMl: 1, solutes: [{ substance: 'sodium-hydroxide', molarity: 1 }] },
  { label: '5 % hypochlorite', volumeMl: 1, solutes: [{ substance: 'sodium-hypochlorite', molarity: 0.7 }] },
];

const LEAST_ML = 0.05;
const MOST_ML = 1000;
const STEPS_PER_DECADE = 2;
/** The volume is told to this share. */
const CLOSE = 0.02;
const GRAVE = gravityOf('review');

/**
 * Smallest volume of each suspect whose addition crosses into `review` or `stop`, or, for a mix already in
 * review, into `stop`. Found on a ladder of volumes and then by halving; what crosses only between two rungs and
 * back again is overlooked.
 *
 * @param suspects - what may be added; their own volume is not read
 * @throws RangeError for an unknown substance
 */
export function distancesToDanger(
  portions: readonly BottleContent[],
  suspects: readonly BottleContent[],
  room: Room,
): Distance[] {
  const before = gravityOf(decide(findingsWith(portions, null, 0, room)));
  return suspects
    .map((suspect) => distanceTo(portions, suspect, Math.min(GRAVE, before - 1), room))
    .sort((a, b) => (a.volumeMl ?? Infinity) - (b.volumeMl ?? Infinity));
}

function findingsWith(
  portions: readonly BottleContent[],
  suspect: BottleContent | null,
  volumeMl: number,
  room: Room,
): readonly Finding[] {
  const poured = suspect ? [...portions, { ...suspect, volumeMl }] : portions;
  const mix = pourMix({ portions: poured, activity: 'davies', temperatureC: 25 });
  return mix.converged ? screenMix(poured, mix, room) : [];
}

function distanceTo(
  portions: readonly BottleContent[],
  suspect: BottleContent,
  threshold: number,
  room: Room,
): Distance {
  const crosses = (volumeMl: number) =>
    gravityOf(decide(findingsWith(portions, suspect, volumeMl, room))) <= threshold;
  const none = { label: suspect.label, volumeMl: null, decision: null, finding: null };
  if (threshold < 0) return none;
  const rungs = Math.ceil(Math.log10(MOST_ML / LEAST_ML) * STEPS_PER_DECADE);
  const ladder = Array.from({ length: rungs + 1 }, (_, rung) =>
    Math.min(MOST_ML, LEAST_ML * 10 ** (rung / STEPS_PER_DECADE)),
  );
  const first = ladder.findIndex(crosses);
  if (first < 0) return none;
  let above = ladder[first] ?? MOST_ML;
  let below = first === 0 ? above : (ladder[first - 1] ?? 0);
  while (above - below > CLOSE * above) {
    const middle = (above + below) / 2;
    if (crosses(middle)) above = middle;
    else below = middle;
  }
  const findings = findingsWith(portions, suspect, above, room);
  return { label: suspect.label, volumeMl: above, decision: decide(findings), finding: findings[0] ?? null };
}
