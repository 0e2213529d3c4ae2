import { componentAmounts, pourMix } from '../chemistry/mixing';
import type { ActivityModel } from '../chemistry/types';
import { gravityOf } from '../domain/gravity';
import { screenedBottle } from './contents';
import { adiabaticRiseK, heatSeverity } from './heat';
import { firingRules } from './rules';
import { decide, screenMix } from './screen';
import { uncoveredFindings } from './uncovered';
import { slipVariants } from './slip-variants';
import type { SlipVariant } from './slip-variants';
import type { BottleContent, Finding, Room, Slip, SlipReport } from './types';

export interface SlipInput {
  /** In order of pouring. */
  readonly portions: readonly BottleContent[];
  /** Further bottles of the same session or trolley. */
  readonly others: readonly BottleContent[];
  readonly activity: ActivityModel;
  readonly temperatureC: number;
  readonly room: Room;
}

const RESULT: Readonly<Record<string, string>> = {
  stop: 'it must not be made here',
  review: 'a safety officer must judge it',
  controlled: 'it needs named controls',
  caution: 'it needs care',
};

/** What can stand above the liquid of its own accord, which only an equilibrium tells. */
const VOLATILE = ['CN-', 'HS-', 'SO3-2', 'NH3'];

/**
 * Whether a handling could be graver than what is intended, told without an equilibrium: conditions on pH then
 * count as met, so that nothing is overlooked. Most slips of a safe mix end here.
 */
function mayBeGraver(
  { portions, isKept }: SlipVariant,
  before: number,
  { temperatureC, room }: SlipInput,
): boolean {
  const bottles = portions.map(screenedBottle);
  const volumeMl = portions.reduce((sum, portion) => sum + portion.volumeMl, 0);
  if (bottles.some(({ unknown }) => unknown.length > 0) || uncoveredFindings(bottles).length > 0) return true;
  if (
    firingRules({ bottles, volumeMl, state: null, temperatureC, isKept, room }).some(
      ({ severity }) => gravityOf(severity) < before,
    )
  )
    return true;
  const heat = heatSeverity(adiabaticRiseK(bottles, volumeMl), temperatureC);
  if (heat && gravityOf(heat) < before) return true;
  const amounts = portions.map(componentAmounts);
  return (
    before > gravityOf('caution') &&
    VOLATILE.some((component) => amounts.some((held) => (held[component] ?? 0) > 0))
  );
}

/** Findings of one handling; none where no equilibrium is found, which is then no claim of safety but not a slip either. */
function findingsOf(
  portions: readonly BottleContent[],
  isKept: boolean,
  { activity, temperatureC, room }: SlipInput,
): Finding[] | null {
  const mix = pourMix({ portions, activity, temperatureC });
  return mix.converged ? screenMix(portions, mix, room, isKept) : null;
}

/**
 * One slip at a time, each a re-run of the same screen; reported are those that make the decision graver.
 * @throws RangeError for an unknown substance or a volume that is not positive
 */
export function checkSlips(input: SlipInput): SlipReport {
  const intended = findingsOf(input.portions, false, input) ?? [];
  const before = gravityOf(decide(intended));
  const variants = slipVariants(input.portions, input.others);
  const raised = variants
    .flatMap((variant) => {
      if (!mayBeGraver(variant, before, input)) return [];
      const findings = findingsOf(variant.portions, variant.isKept, input);
      const [gravest] = findings ?? [];
      const decision = decide(findings ?? []);
      return gravest && gravityOf(decision) < before ? [slipOf(variant, gravest, decision)] : [];
    })
    .sort((a, b) => gravityOf(a.decision) - gravityOf(b.decision));
  const stops = raised.filter(({ decision }) => decision === 'stop').length;
  return {
    tried: variants.length,
    raised,
    stops,
    summary: summaryOf(variants.length, raised, stops),
    separation: separationFor(raised),
  };
}

function slipOf({ kind, clause, concerns }: SlipVariant, finding: Finding, decision: Slip['decision']): Slip {
  return {
    kind,
    sentence: `If ${clause}, ${RESULT[decision] ?? 'it changes'}: ${finding.reason}`,
    decision,
    finding,
    concerns,
  };
}

function summaryOf(tried: number, raised: readonly Slip[], stops: number): string {
  if (raised.length === 0) return `None of ${tried} single slips makes it graver.`;
  if (stops === 0) return `${raised.length} of ${tried} single slips make it graver; none leads to a stop.`;
  return `${stops} of ${tried} single slips ${stops === 1 ? 'leads' : 'lead'} to a stop.`;
}

const REMEDY: Readonly<Record<Slip['kind'], (label: string) => string>> = {
  'too-strong': (label) => `Bring only the diluted ${label} to the bench; leave its stock in the prep room.`,
  doubled: (label) => `Hand ${label} out in bottles that hold one portion.`,
  swapped: (label) => `Give ${label} a cap of another colour and its own tray.`,
  reversed: (label) => `Number the bottles in the order of pouring, ${label} first.`,
  'left-out': (label) => `Tick each portion as it is poured, ${label} among them.`,
  'wrong-substance': (label) => `Read the label of ${label} aloud to a second person before weighing.`,
  'wrong-bottle': (label) => `Keep ${label} off this trolley.`,
  overnight: () => 'Destroy the mix the same day; give the batch no shelf life.',
  'wrong-jar': () => 'Put one labelled waste jar beside the mix and no other.',
};

/** The remedy that takes away most of the gravest slips. */
function separationFor(raised: readonly Slip[]): string | null {
  const [gravest] = raised;
  if (!gravest) return null;
  const counts = new Map<string, number>();
  for (const { kind, decision, concerns } of raised) {
    if (decision !== gravest.decision) continue;
    const label = (kind === 'wrong-bottle' ? concerns.at(-1) : concerns[0]) ?? '';
    const remedy = REMEDY[kind](label);
    counts.set(remedy, (counts.get(remedy) ?? 0) + 1);
  }
  return [...counts].sort((a, b) => b[1] - a[1])[0]?.[0] ?? null;
}
