import { ALL_SUBSTANCES } from '../chemistry/substances';
import { isMasterComponent } from '../chemistry/species-catalogue';
import { SEVERITIES } from '../domain/gravity';
import examinedData from './data/examined.json';
import storageData from './data/storage.json';
import { precautionText, statementFor, statementText } from './classification/statements';
import { GASES, GROUPS, HAZARD_RULES, INHERITS, POLICY_GATES, SUBSTANCE_HAZARDS } from './tables';
import type { Gas, HazardRule, ReactiveGroup, SubstanceHazards } from './tables';
import { WASTE_STREAMS } from './waste';

/** One thing wrong in the hazard tables. */
export interface HazardDataFault {
  readonly where: string;
  readonly what: string;
}
/** The tables under test; the house's own where left out. */
export interface HazardTables {
  readonly rules?: readonly HazardRule[];
  readonly groups?: readonly ReactiveGroup[];
  readonly gases?: readonly Gas[];
  readonly substances?: readonly SubstanceHazards[];
}

const KINDS = new Set([
  'toxic-gas',
  'flammable-gas',
  'carcinogenic-vapour',
  'explosion',
  'explosion-on-standing',
  'fire',
  'violent-heat',
  'corrosive-splash',
  'pressure',
  'toxic-product',
  'quality-only',
]);
const FORMS = new Set(['solid', 'dry', 'hydrogencarbonate', 'ammonia-solution', 'ammonium-salt']);
/** Reactants counted by another component's amount. */
const COUNTED = new Set(['H+', 'OH-', 'NH4+', 'Cr2O7-2', 'HNO3', 'HCl', 'HNO2']);

/** Rules against groups and gases; substances against groups, storage, statements and the catalogue. */
export function findHazardDataFaults({
  rules = HAZARD_RULES,
  groups = GROUPS,
  gases = GASES,
  substances = SUBSTANCE_HAZARDS,
}: HazardTables = {}): HazardDataFault[] {
  const groupIds = new Set(groups.map(({ id }) => id));
  return [
    ...twice(rules.map(({ id }) => id)),
    ...twice(groups.map(({ id }) => id)),
    ...twice(substances.map(({ id }) => id)),
    ...rules.flatMap((rule) => ruleFaults(rule, groupIds, groups, gases)),
    ...variantFaults(rules),
    ...gases.flatMap(gasFaults),
    ...substances.flatMap((entry) => substanceFaults(entry, groupIds)),
    ...ALL_SUBSTANCES.filter(({ id }) => !substances.some((entry) => entry.id === id)).map(({ id }) => ({
      where: id,
      what: 'is in the catalogue without hazard data',
    })),
    ...relationFaults(groupIds),
  ];
}

function twice(ids: readonly string[]): HazardDataFault[] {
  return ids
    .filter((id, index) => ids.indexOf(id) !== index)
    .map((where) => ({ where, what: 'stands twice' }));
}

function ruleFaults(
  rule: HazardRule,
  groupIds: ReadonlySet<string>,
  groups: readonly ReactiveGroup[],
  gases: readonly Gas[],
): HazardDataFault[] {
  const { id: where, conditions } = rule;
  const faults: string[] = [];
  for (const group of [...rule.groups, ...(conditions.ofGroup ? [conditions.ofGroup] : [])])
    if (!groupIds.has(group)) faults.push(`names an unknown group ${group}`);
  if (rule.groups.length === 0 || new Set(rule.groups).size < rule.groups.length)
    faults.push('names no group, or one twice');
  if (conditions.ofGroup && !rule.groups.includes(conditions.ofGroup))
    faults.push(`states the strength of ${conditions.ofGroup}, which it does not name`);
  if (!SEVERITIES.includes(rule.severity)) faults.push(`has an unknown severity ${rule.severity}`);
  for (const kind of rule.kinds) if (!KINDS.has(kind)) faults.push(`has an unknown kind ${kind}`);
  if (conditions.form !== undefined && !FORMS.has(conditions.form))
    faults.push(`has an unknown form ${conditions.form}`);
  if (!/\.$/.test(rule.reason) || rule.mustNot === '' || rule.source === '')
    faults.push('lacks a reason, what must not be done, or a source');
  if (rule.severity !== 'note' && rule.precautions.length === 0) faults.push('names no precaution');
  if (rule.severity === 'stop' && rule.kinds.every((kind) => kind === 'quality-only'))
    faults.push('stops for quality alone');
  const countable = new Set(groups.flatMap(({ limiting }) => limiting));
  for (const { consumes, limiting, gives } of rule.gas ?? []) {
    if (!(limiting in consumes)) faults.push(`is limited by ${limiting}, which it does not consume`);
    for (const [reactant, count] of Object.entries(consumes)) {
      if (!(count > 0)) faults.push(`consumes ${count} of ${reactant}`);
      if (!COUNTED.has(reactant) && !countable.has(reactant) && !isMasterComponent(reactant))
        faults.push(`can't count ${reactant}`);
    }
    for (const [gas, mol] of Object.entries(gives)) {
      if (!(mol > 0)) faults.push(`gives ${mol} of ${gas}`);
      if (!gases.some(({ id }) => id === gas)) faults.push(`gives an unknown gas ${gas}`);
    }
  }
  return faults.map((what) => ({ where, what }));
}

/** Rules on the same groups must differ in what they ask for. */
function variantFaults(rules: readonly HazardRule[]): HazardDataFault[] {
  const asked = rules.map(
    ({ groups, conditions }) => `${[...groups].sort().join('+')}|${JSON.stringify(conditions)}`,
  );
  return rules
    .filter((_, index) => asked.indexOf(asked[index] ?? '') !== index)
    .map(({ id: where }) => ({ where, what: 'asks for the same as an earlier rule' }));
}

function gasFaults({ id: where, limits, aqueousOverGas, molarMassGPerMol }: Gas): HazardDataFault[] {
  const faults: string[] = [];
  if (!(molarMassGPerMol > 0)) faults.push('has no molar mass');
  if (aqueousOverGas !== null && !(aqueousOverGas > 0))
    faults.push('has a Henry constant that is not positive');
  for (const { name, ppm, source } of limits)
    if (!(ppm > 0) || name === '' || source === '') faults.push('has a limit without figure, name or source');
  return faults.map((what) => ({ where, what }));
}

function substanceFaults(entry: SubstanceHazards, groupIds: ReadonlySet<string>): HazardDataFault[] {
  const { id: where } = entry;
  const faults: string[] = [];
  if (!ALL_SUBSTANCES.some(({ id }) => id === where)) faults.push('is not in the catalogue');
  for (const group of entry.groups) if (!groupIds.has(group)) faults.push(`names an unknown group ${group}`);
  if (!storageData.groups.includes(entry.storageGroup))
    faults.push(`has an unknown storage group ${entry.storageGroup}`);
  for (const name of entry.classes) {
    const stated = statementFor(name);
    if (!stated) faults.push(`has a class without a statement, ${name}`);
    if (stated && statementText(stated.h) === '') faults.push(`has a statement without a text, ${stated.h}`);
  }
  for (const { class: name, min, max } of entry.specificLimits)
    if (!(min > 0) || (max !== undefined && !(max > min)) || !statementFor(name))
      faults.push(`has a limit that can't be read, ${name}`);
  for (const code of entry.euh)
    if (statementText(code) === '') faults.push(`has a statement without a text, ${code}`);
  if (entry.source === '') faults.push('has no source');
  return faults.map((what) => ({ where, what }));
}

function relationFaults(groupIds: ReadonlySet<string>): HazardDataFault[] {
  const faults: HazardDataFault[] = [];
  for (const [group, parents] of Object.entries(INHERITS))
    for (const name of [group, ...parents])
      if (!groupIds.has(name)) faults.push({ where: 'inheritance', what: `names an unknown group ${name}` });
  for (const [group, examined] of Object.entries(examinedData.reactive))
    for (const name of [group, ...examined])
      if (!groupIds.has(name))
        faults.push({ where: 'examined pairs', what: `names an unknown group ${name}` });
  const matrix = storageData.matrix as Readonly<
    Record<string, Readonly<Record<string, string | undefined>> | undefined>
  >;
  for (const first of storageData.groups)
    for (const second of storageData.groups)
      if (!matrix[first]?.[second] || matrix[first][second] !== matrix[second]?.[first])
        faults.push({ where: 'storage', what: `${first} with ${second} is missing or one-sided` });
  for (const { id, mustNotMeet } of WASTE_STREAMS)
    for (const other of mustNotMeet)
      if (!WASTE_STREAMS.find((stream) => stream.id === other)?.mustNotMeet.includes(id))
        faults.push({ where: 'waste', what: `${id} with ${other} is one-sided` });
  for (const { id, basis } of POLICY_GATES)
    if (basis === '') faults.push({ where: id, what: 'has no basis' });
  for (const code of ['P280', 'P305+P351+P338', 'P310'])
    if (precautionText(code) === '') faults.push({ where: code, what: 'has no text' });
  return faults;
}
