import examinedData from './data/examined.json';
import type { ScreenedBottle, ScreenedSolute } from './contents';
import { groupName, HAZARD_RULES } from './tables';
import type { Finding } from './types';

const EXAMINED = examinedData.reactive as Readonly<Record<string, readonly string[] | undefined>>;
const RULED = new Set(
  HAZARD_RULES.flatMap(({ groups }) =>
    groups.flatMap((a) => groups.filter((b) => b !== a).map((b) => `${a}|${b}`)),
  ),
);

function isRuled(first: ScreenedSolute, second: ScreenedSolute): boolean {
  return [...first.groups].some((a) => [...second.groups].some((b) => RULED.has(`${a}|${b}`)));
}

/** The highly reactive group of one for which nothing is known of the other; null where all was looked at. */
function uncoveredGroup(first: ScreenedSolute, second: ScreenedSolute): string | null {
  if (second.groups.size === 0 || isRuled(first, second)) return null;
  for (const group of first.groups) {
    const examined = EXAMINED[group];
    if (examined && [...second.groups].some((other) => other !== group && !examined.includes(other)))
      return group;
  }
  return null;
}

/**
 * Meetings of something highly reactive with something else that no rule speaks of: unknown is not safe.
 * Substances in no reactive group at all count as looked at.
 */
export function uncoveredFindings(bottles: readonly ScreenedBottle[]): Finding[] {
  const held = bottles.flatMap(({ label, solutes }) => solutes.map((solute) => ({ label, solute })));
  return held.flatMap((first) =>
    held.flatMap((second): Finding[] => {
      const group = first === second ? null : uncoveredGroup(first.solute, second.solute);
      if (!group) return [];
      return [
        {
          rule: `no-rule:${first.solute.substance.id}+${second.solute.substance.id}`,
          severity: 'review',
          scope: 'mix',
          title: `No data on ${first.solute.substance.name} with ${second.solute.substance.name}`,
          reason: `${first.solute.substance.name} is highly reactive (${groupName(group).toLowerCase()}), and no rule speaks of its meeting ${second.solute.substance.name}. Unknown is not safe.`,
          mustNot: 'Do not try it out.',
          gas: null,
          precautions: ['Look the pair up in a handbook of reactive hazards before asking again'],
          alternative: null,
          source: 'House rule',
          concerns: [...new Set([first.label, second.label])],
        },
      ];
    }),
  );
}
