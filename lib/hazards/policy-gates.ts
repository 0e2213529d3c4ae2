import { screenedBottle } from './contents';
import type { ScreenedBottle, ScreenedSolute } from './contents';
import { sortFindings } from './screen';
import { findSubstanceHazards, POLICY_GATES } from './tables';
import type { BottleContent, Finding, Severity } from './types';

interface Gate {
  readonly id: string;
  readonly title: string;
  readonly severity: Severity;
  readonly trips: (solute: ScreenedSolute, bottle: ScreenedBottle) => boolean;
}

/** Restricted substances whose gate is their own; ammonium nitrate is restricted as a solid. */
const OWN_GATE = ['cyanide', 'azide', 'mercury_salt', 'chromate', 'perchlorate', 'ammonia_or_ammonium'];

/** When each gate of the policy table trips; amounts are ours, to be confirmed locally. */
const GATES: readonly Gate[] = [
  { id: 'cyanide', title: 'Cyanide', severity: 'review', trips: ({ groups }) => groups.has('cyanide') },
  { id: 'azide', title: 'Azide', severity: 'review', trips: ({ groups }) => groups.has('azide') },
  { id: 'mercury', title: 'Mercury', severity: 'review', trips: ({ groups }) => groups.has('mercury_salt') },
  {
    id: 'chromium6',
    title: 'Chromium(VI)',
    severity: 'controlled',
    trips: ({ groups, molarity }) => groups.has('chromate') && molarity > 0.1,
  },
  {
    id: 'lead_cadmium',
    title: 'Lead or cadmium',
    severity: 'controlled',
    trips: ({ groups, molarity, substance }) =>
      (groups.has('lead_salt') && molarity > 0.1) || substance.id.startsWith('cadmium'),
  },
  {
    id: 'conc_ox_acid',
    title: 'Strong oxidising acid',
    severity: 'review',
    trips: ({ substance, molarity }) =>
      (substance.id === 'nitric-acid' && molarity > 8) || substance.id === 'perchloric-acid',
  },
  {
    id: 'perchlorate',
    title: 'Perchlorate',
    severity: 'review',
    trips: ({ groups, molarity }) => groups.has('perchlorate') && molarity > 0.1,
  },
  {
    id: 'restricted',
    title: 'Restricted substance',
    severity: 'controlled',
    trips: ({ groups, molarity, substance }) =>
      molarity > 0.1 &&
      !OWN_GATE.some((group) => groups.has(group)) &&
      (findSubstanceHazards(substance.id)?.restricted ?? false),
  },
  {
    id: 'silver_ammonia',
    title: 'Ammoniacal silver kept in a bottle',
    severity: 'stop',
    trips: ({ groups }, { solutes }) =>
      groups.has('silver_salt') && solutes.some((other) => other.groups.has('ammonia_or_ammonium')),
  },
];

/** Substances and amounts that local rules keep for a competent person. */
export function screenPolicy(contents: readonly BottleContent[]): Finding[] {
  const bottles = contents.map(screenedBottle);
  return sortFindings(
    GATES.flatMap(({ id, title, severity, trips }) => {
      const tripping = bottles.filter((bottle) => bottle.solutes.some((solute) => trips(solute, bottle)));
      const gate = POLICY_GATES.find((entry) => entry.id === id);
      if (tripping.length === 0 || !gate) return [];
      return [
        {
          rule: `policy:${id}`,
          severity,
          scope: 'policy' as const,
          title: `${title}: kept for a competent person`,
          reason: `Local rules usually ask for this: ${gate.approval}. It applies to ${gate.trigger}; usual limit: ${gate.usualLimit}.`,
          mustNot: null,
          gas: null,
          precautions: [`Approval: ${gate.approval}`],
          alternative: gate.substitution === 'none' ? null : gate.substitution,
          source: `House policy table (${gate.basis})`,
          concerns: tripping.map(({ label }) => label),
        },
      ];
    }),
  );
}
