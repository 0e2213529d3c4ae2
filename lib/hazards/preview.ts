import { pourMix } from '../chemistry/mixing';
import type { ActivityModel, Mix, NotConverged } from '../chemistry/types';
import { solutesAfterReaction } from './classification/after-reaction';
import { classifySolution } from './classification/classify-solution';
import { screenPolicy } from './policy-gates';
import { decide, screenMix, sortFindings } from './screen';
import { checkSlips } from './slips';
import type { BottleContent, Finding, MixPreview, Room } from './types';

export interface PreviewInput {
  /** In order of pouring. */
  readonly portions: readonly BottleContent[];
  readonly activity: ActivityModel;
  readonly temperatureC: number;
  readonly room: Room;
  /** Whether every single slip is tried too. */
  readonly slips?: boolean;
}
export type PreviewOutcome = MixPreview | (NotConverged & { readonly afterPortion: string });

/**
 * The whole answer about one mix.
 * @throws RangeError for an unknown substance or a volume that is not positive
 */
export function previewMix({
  portions,
  activity,
  temperatureC,
  room,
  slips = false,
}: PreviewInput): PreviewOutcome {
  const mix = pourMix({ portions, activity, temperatureC });
  if (!mix.converged) return mix;
  const findings = sortFindings([
    ...screenMix(portions, mix, room),
    ...orderFindings(portions, mix, activity, temperatureC, room),
    ...screenPolicy(portions),
  ]);
  return {
    finalVolumeMl: mix.finalVolumeMl,
    diluted: mix.diluted,
    steps: mix.steps,
    equilibrium: mix.equilibrium,
    appearance: mix.appearance,
    findings,
    classification: classifySolution({
      solutes: solutesAfterReaction(mix.diluted, mix.equilibrium),
      pH: mix.equilibrium.pH,
    }),
    decision: decide(findings),
    ...(slips ? { slips: checkSlips({ portions, others: [], activity, temperatureC, room }) } : {}),
  };
}

const MOST_PORTIONS_FOR_ORDERS = 4;

/** Findings that another order of pouring would add. */
function orderFindings(
  portions: readonly BottleContent[],
  mix: Mix,
  activity: ActivityModel,
  temperatureC: number,
  room: Room,
): Finding[] {
  if (portions.length < 2 || portions.length > MOST_PORTIONS_FOR_ORDERS) return [];
  const known = new Set(screenMix(portions, mix, room).map(({ rule }) => rule));
  return permutations(portions)
    .slice(1)
    .flatMap((order) => {
      const other = pourMix({ portions: order, activity, temperatureC });
      if (!other.converged) return [];
      return screenMix(order, other, room)
        .filter(({ rule, severity, scope }) => scope === 'mix' && severity !== 'note' && !known.has(rule))
        .map((finding) => ({
          ...finding,
          scope: 'order' as const,
          severity: finding.severity === 'stop' ? ('review' as const) : ('caution' as const),
          reason: `Safe as written, but not if poured in the order ${order.map(({ label }) => label).join(', ')}. ${finding.reason}`,
        }));
    });
}

function permutations<T>(items: readonly T[]): T[][] {
  if (items.length <= 1) return [[...items]];
  return items.flatMap((item, index) =>
    permutations(items.filter((_, other) => other !== index)).map((rest) => [item, ...rest]),
  );
}
