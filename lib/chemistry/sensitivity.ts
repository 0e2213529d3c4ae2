import { componentAmounts } from './mixing';
import { PreparedSystem } from './prepared-system';
import type { MixInput, NotConverged } from './types';

const LN10 = Math.LN10;

/** How one input moves the answer. */
export interface Sensitivity {
  readonly input:
    | { readonly kind: 'volume'; readonly portion: string }
    | { readonly kind: 'strength'; readonly portion: string; readonly substance: string }
    | { readonly kind: 'constant'; readonly species: string };
  /** d ln(molarity) / d ln(input) by species. */
  readonly lnMolarity: Readonly<Record<string, number>>;
  /** d pH / d ln(input); null where there is no H+. */
  readonly pH: number | null;
}

type Change = Parameters<PreparedSystem['respond']>[0];

/**
 * What each volume, strength and constant does to the mixture, by the implicit function theorem at its answer;
 * the same solids are taken to stay.
 *
 * @returns one entry per input, in that order; or why the mixture has no answer
 * @throws RangeError for a mix that `pourMix` would refuse
 */
export function sensitivities({
  portions,
  activity,
  temperatureC,
}: MixInput): readonly Sensitivity[] | NotConverged {
  const volumeMl = portions.reduce((sum, portion) => sum + portion.volumeMl, 0);
  const amounts: Record<string, number> = {};
  for (const portion of portions) {
    for (const [id, mol] of Object.entries(componentAmounts(portion))) amounts[id] = (amounts[id] ?? 0) + mol;
  }
  const point = { volumeL: volumeMl / 1000, amounts, pH: null };
  const prepared = new PreparedSystem({
    ...point,
    reactions: 'catalogue',
    suppress: [],
    activity,
    temperatureC,
    headspace: { kind: 'none' },
  });
  const solved = prepared.solve(point);
  if (!solved.converged) return solved;

  const changes: { readonly input: Sensitivity['input']; readonly change: Change }[] = [
    ...portions.map((portion) => ({
      input: { kind: 'volume' as const, portion: portion.label },
      change: { amounts: componentAmounts(portion), lnVolume: portion.volumeMl / volumeMl },
    })),
    ...portions.flatMap((portion) =>
      portion.solutes.map((solute) => ({
        input: { kind: 'strength' as const, portion: portion.label, substance: solute.substance },
        change: { amounts: componentAmounts({ ...portion, solutes: [solute] }) },
      })),
    ),
    ...[...prepared.system.aqueous, ...prepared.system.solids].map(({ species }) => ({
      input: { kind: 'constant' as const, species },
      change: { lnK: { [species]: 1 } },
    })),
  ];
  return changes.flatMap(({ input, change }) => {
    const answer = prepared.respond(change);
    if (!answer) return [];
    const row = prepared.columnOf.get('H+');
    const lnMolarity = [...prepared.columnOf].map(
      ([id, column]) => [id, (answer.lnAmounts[column] ?? 0) - (change.lnVolume ?? 0)] as const,
    );
    return [
      {
        input,
        lnMolarity: Object.fromEntries(lnMolarity),
        pH: row === undefined ? null : -(answer.lnActivity[row] ?? 0) / LN10,
      },
    ];
  });
}
