import { gravityOf, SEVERITIES } from '../domain/gravity';
import type { EquilibriumState } from '../chemistry/types';
import { actsAsAcid } from './acting-acids';
import type { ScreenedBottle, ScreenedSolute } from './contents';
import { groupsOf } from './contents';
import { estimateGas, worstCase } from './gas';
import { findGas, groupName, HAZARD_RULES } from './tables';
import type { HazardRule } from './tables';
import type { GasEstimate, Room, Severity } from './types';

/** What meets what, and how. */
export interface Meeting {
  readonly bottles: readonly ScreenedBottle[];
  readonly volumeMl: number;
  /** Equilibrium after all have met; null where none was found: conditions on pH then count as met. */
  readonly state: EquilibriumState | null;
  readonly temperatureC: number;
  readonly isKept: boolean;
  readonly room: Room;
}

export interface Firing {
  readonly rule: HazardRule;
  readonly severity: Severity;
  readonly gas: GasEstimate | null;
  readonly concerns: readonly string[];
}

/** Rules about solids, powders and dry residues do not meet solutions as poured. */
const SOLUTION_FORMS = new Set(['ammonia-solution', 'ammonium-salt', 'hydrogencarbonate']);
/** Above this pH an ammonium salt gives free ammonia that can bind metals. */
const FREE_AMMONIA_FROM_PH = 8;

/** Every rule whose groups all meet and whose conditions hold, gravest first. */
export function firingRules(meeting: Meeting): Firing[] {
  const all = groupsMet(meeting);
  return HAZARD_RULES.filter((rule) => meets(rule, all, meeting) && holds(rule, meeting))
    .map((rule) => fire(rule, meeting))
    .sort((a, b) => gravityOf(a.severity) - gravityOf(b.severity) || a.rule.id.localeCompare(b.rule.id));
}

/** Groups of all that meets, with those that only the meeting makes. */
function groupsMet({ bottles, state }: Meeting): Set<string> {
  const all = new Set(bottles.flatMap((bottle) => [...groupsOf(bottle)]));
  const pH = state?.pH ?? null;
  const isAmmoniacal = all.has('ammonia_or_ammonium') && (pH === null || pH > FREE_AMMONIA_FROM_PH);
  if (all.has('silver_salt') && isAmmoniacal) all.add('ammoniacal_silver');
  return all;
}

/** Whether the groups of a rule are there; an acid may be one by what it does instead of by name. */
function meets(rule: HazardRule, all: ReadonlySet<string>, { bottles, volumeMl, state }: Meeting): boolean {
  const missing = rule.groups.filter((group) => !all.has(group));
  if (missing.length === 0) return true;
  const [source] = rule.groups;
  if (
    missing.length > 1 ||
    missing[0] !== 'acid_mineral_nonox' ||
    rule.conditions.pHBelow === undefined ||
    !source
  )
    return false;
  return actsAsAcid(
    source,
    bottles.flatMap(({ solutes }) => solutes),
    volumeMl,
    state,
  );
}

/** A condition that is not known counts as met, so that the graver of two variants is told. */
function holds(rule: HazardRule, meeting: Meeting): boolean {
  const { conditions } = rule;
  const pH = meeting.state?.pH ?? null;
  if (conditions.pHBelow !== undefined && pH !== null && pH >= conditions.pHBelow) return false;
  if (conditions.pHAbove !== undefined && pH !== null && pH <= conditions.pHAbove) return false;
  if (conditions.hotterThanC !== undefined && meeting.temperatureC <= conditions.hotterThanC) return false;
  if (conditions.coolerThanC !== undefined && meeting.temperatureC > conditions.coolerThanC) return false;
  const strongest = strengthOf(rule, meeting);
  if (conditions.strongerThanMolarity !== undefined && strongest <= conditions.strongerThanMolarity)
    return false;
  if (conditions.weakerThanMolarity !== undefined && strongest > conditions.weakerThanMolarity) return false;
  if (conditions.standing === 'over-half-a-year') return false;
  if (conditions.standing === 'over-an-hour' && !meeting.isKept) return false;
  if (conditions.standing === 'fresh' && meeting.isKept) return false;
  if (conditions.order === 'water-into-acid' && !isAcidPouredFirst(meeting.bottles)) return false;
  return conditions.form === undefined || formHolds(conditions.form, meeting, pH);
}

/** Strength as poured of the strongest member of the group that the rule's strengths speak of. */
function strengthOf(rule: HazardRule, { bottles }: Meeting): number {
  const group = rule.conditions.ofGroup ?? rule.groups[0] ?? '';
  const members = bottles.flatMap(({ solutes }) => solutes.filter((solute) => solute.groups.has(group)));
  return Math.max(0, ...members.map(({ molarity }) => molarity));
}

function isAcidPouredFirst(bottles: readonly ScreenedBottle[]): boolean {
  const position = bottles.findIndex(({ solutes }) =>
    solutes.some(({ groups }) => groups.has('concentrated_acid')),
  );
  return position >= 0 && position < bottles.length - 1;
}

function formHolds(form: string, { bottles }: Meeting, pH: number | null): boolean {
  if (!SOLUTION_FORMS.has(form)) return false;
  const solutes = bottles.flatMap((bottle) => bottle.solutes);
  const has = (test: (solute: ScreenedSolute) => boolean) => solutes.some(test);
  if (form === 'ammonia-solution') {
    const isFree = pH === null || pH >= FREE_AMMONIA_FROM_PH;
    return (
      has(({ substance }) => substance.id === 'ammonia-solution') ||
      (isFree && has(({ groups }) => groups.has('ammonia_or_ammonium')))
    );
  }
  if (form === 'ammonium-salt')
    return has(
      ({ substance, groups }) => groups.has('ammonia_or_ammonium') && substance.id !== 'ammonia-solution',
    );
  return has(({ substance }) => substance.id === 'sodium-hydrogencarbonate');
}

function fire(rule: HazardRule, meeting: Meeting): Firing {
  const solutes = meeting.bottles.flatMap((bottle) => bottle.solutes);
  const gas = gravestGas(rule, solutes, meeting);
  const escalated = gas && rule.severity !== 'stop' ? escalate(rule, gas) : rule.severity;
  const named = meeting.bottles.filter(({ solutes: own }) =>
    own.some((solute) => rule.groups.some((group) => group !== 'water' && solute.groups.has(group))),
  );
  const acidByName = meeting.bottles.some(({ solutes: own }) =>
    own.some((solute) => solute.groups.has('acid_mineral_nonox')),
  );
  const isActing = rule.groups.includes('acid_mineral_nonox') && !acidByName;
  return {
    rule,
    severity: escalated,
    gas,
    concerns: (isActing ? meeting.bottles : named).map(({ label }) => label),
  };
}

/** Of the gases a rule can give, the one furthest above its limit. */
function gravestGas(
  rule: HazardRule,
  solutes: readonly ScreenedSolute[],
  meeting: Meeting,
): GasEstimate | null {
  const found = (rule.gas ?? []).flatMap((stoichiometry) =>
    Object.entries(worstCase(stoichiometry, solutes)).flatMap(([gasId, mol]) => {
      const estimate = estimateGas(gasId, mol, meeting.volumeMl, meeting.state, meeting.room);
      return estimate ? [estimate] : [];
    }),
  );
  const weight = (gas: GasEstimate) => gas.ppmInBreathingZone / (gas.limit?.ppm ?? 1e6);
  return [...found].sort((a, b) => weight(b) - weight(a))[0] ?? null;
}

/**
 * Raises a severity where the worst case passes limits, in the room or before the face. Never lowers one. Slow
 * gases are judged by the room alone, since nobody breathes all of it at once.
 */
function escalate({ severity, isSlow }: HazardRule, estimate: GasEstimate): Severity {
  const gas = findGas(estimate.species);
  const limit = (kind: string) => gas?.limits.find((named) => named.kind === kind)?.ppm ?? Infinity;
  const fillsRoom = estimate.ppmInRoom > limit('short-term') || estimate.ppmInRoom > limit('aegl-2') / 2;
  const fillsZone =
    estimate.ppmInBreathingZone > limit('idlh') || estimate.ppmInBreathingZone > limit('aegl-3');
  if (fillsRoom) return graver(severity, isSlow ? 'controlled' : 'review');
  return fillsZone && !isSlow ? graver(severity, 'controlled') : severity;
}

function graver(a: Severity, b: Severity): Severity {
  return SEVERITIES.indexOf(a) <= SEVERITIES.indexOf(b) ? a : b;
}

/** What meets, in words. */
export function meetingTitle(rule: HazardRule): string {
  const names = rule.groups
    .filter((group) => group !== 'water')
    .map((group) => groupName(group).toLowerCase());
  return sentenceCase(names.join(' with '));
}

function sentenceCase(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
