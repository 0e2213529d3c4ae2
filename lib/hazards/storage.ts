import { findSubstance } from '../chemistry/substances';
import storageData from './data/storage.json';
import { groupsAt } from './contents';
import { sortFindings } from './screen';
import { findSubstanceHazards } from './tables';
import type { Finding } from './types';

export type Togetherness = 'OK' | 'separate' | 'never';
const MATRIX = storageData.matrix as Readonly<
  Record<string, Readonly<Record<string, Togetherness | undefined>> | undefined>
>;
const REASONS = storageData.reasons as Readonly<Record<string, string | undefined>>;

/** What stands in a place: a lot or bottle with one main substance. */
export interface Stored {
  readonly label: string;
  /** Catalogue id or CAS number. */
  readonly substance: string;
  /** mol/L; null for the goods as sold. */
  readonly molarity: number | null;
}

/** Below this a solution of an acid, base or solvent is stored with the general ones. */
const DILUTE_UP_TO_MOLARITY = 0.5;
const TAMED_BY_DILUTION = new Set(['acid_inorganic', 'acid_oxidising', 'acid_organic', 'base', 'flammable']);
/** Beside these an acid is an acid, however dilute. */
const KNOWS_NO_DILUTE = new Set(['cyanide', 'sulfide', 'restricted', 'water_reactive']);

/** Storage group at a strength; null where no hazard data are held. */
export function storageGroupOf({ substance: idOrCas, molarity }: Stored): string | null {
  const substance = findSubstance(idOrCas);
  const hazards = substance && findSubstanceHazards(substance.id);
  if (!substance || !hazards) return null;
  const { storageGroup, groups } = hazards;
  if (molarity === null) return storageGroup;
  const isTamedNitrate =
    storageGroup === 'oxidiser' &&
    groups.includes('nitrate_ox') &&
    !groupsAt(substance.id, molarity).has('nitrate_ox');
  const isTamed = TAMED_BY_DILUTION.has(storageGroup) && molarity <= DILUTE_UP_TO_MOLARITY;
  return isTamedNitrate || isTamed ? 'general' : storageGroup;
}

/** Whether two storage groups may share a place; unknown ones may not. */
export function mayStandTogether(first: string, second: string): Togetherness {
  return MATRIX[first]?.[second] ?? 'never';
}

/**
 * A lot or bottle against the others in its place.
 * @returns `stop` for what must not share a cabinet, `caution` for what needs its own tray
 */
export function screenStorage(arriving: Stored, standing: readonly Stored[]): Finding[] {
  return sortFindings(
    standing.flatMap((other): Finding[] => {
      const undiluted = [arriving, other].map((stored) => storageGroupOf({ ...stored, molarity: null }));
      const [own = null, theirs = null] = undiluted.some((group) => group && KNOWS_NO_DILUTE.has(group))
        ? undiluted
        : [arriving, other].map(storageGroupOf);
      if (own === null || theirs === null)
        return [
          storageFinding(
            'review',
            arriving,
            other,
            'no storage group is held for one of them, and unknown is not safe',
          ),
        ];
      const together = mayStandTogether(own, theirs);
      if (together === 'OK' || (own === 'general' && theirs === 'general')) return [];
      const why = REASONS[[own, theirs].sort().join('+')] ?? 'they differ in storage group';
      return [storageFinding(together === 'never' ? 'stop' : 'caution', arriving, other, why)];
    }),
  );
}

function storageFinding(
  severity: Finding['severity'],
  arriving: Stored,
  other: Stored,
  why: string,
): Finding {
  const isApart = severity === 'caution';
  return {
    rule: `storage:${severity}`,
    severity,
    scope: 'storage',
    title: isApart ? 'Needs its own tray' : 'Must not share this place',
    reason: `${arriving.label} ${isApart ? 'needs a tray apart from' : 'must not share a cabinet with'} ${other.label}: ${why}.`,
    mustNot: isApart ? null : `Do not put ${arriving.label} with ${other.label}.`,
    gas: null,
    precautions: [
      isApart
        ? 'Its own tray, with no common path for a spill'
        : 'Another cabinet, with no common drain or air space',
    ],
    alternative: null,
    source: `House storage table (${storageData.sources.join('; ')})`,
    concerns: [arriving.label, other.label],
  };
}
