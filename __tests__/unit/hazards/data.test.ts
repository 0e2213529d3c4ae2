import { findHazardDataFaults } from '../../../lib/hazards/data-check';
import { GROUPS, HAZARD_RULES, SUBSTANCE_HAZARDS } from '../../../lib/hazards/tables';
import type { HazardRule } from '../../../lib/hazards/tables';

const [model] = HAZARD_RULES;
if (!model) throw new Error('no rules');
const planted = (change: Partial<HazardRule>): HazardRule[] => [{ ...model, ...change }];

test('the tables agree with each other and with the catalogue', () => {
  expect(findHazardDataFaults()).toEqual([]);
});

test('there are at least the 178 rules to start from, each with its source', () => {
  expect(HAZARD_RULES.length).toBeGreaterThanOrEqual(178);
  expect(HAZARD_RULES.filter(({ source }) => source === '')).toEqual([]);
});

test.each([
  ['a group that is not there', { groups: ['cyanide', 'phlogiston'] }, /unknown group phlogiston/],
  [
    'a gas that is not there',
    { gas: [{ consumes: { 'CN-': 1 }, limiting: 'CN-', gives: { Xx: 1 } }] },
    /unknown gas Xx/,
  ],
  [
    'a reactant nobody can count',
    { gas: [{ consumes: { 'Qq+': 1 }, limiting: 'Qq+', gives: { HCN: 1 } }] },
    /can't count Qq\+/,
  ],
  [
    'a limiting reactant that is not consumed',
    { gas: [{ consumes: { 'CN-': 1 }, limiting: 'H+', gives: { HCN: 1 } }] },
    /limited by H\+/,
  ],
  ['a strength of a group it does not name', { conditions: { ofGroup: 'peroxide' } }, /strength of peroxide/],
  ['no precaution', { precautions: [] }, /no precaution/],
] as const)('a rule with %s is found out', (_title, change, message) => {
  const faults = findHazardDataFaults({ rules: planted(change as unknown as Partial<HazardRule>) });
  expect(faults.map(({ what }) => what).join('; ')).toMatch(message);
});

test('two rules that ask for the same are found out', () => {
  expect(findHazardDataFaults({ rules: [model, { ...model, id: 'XX99' }] })).toContainEqual({
    where: 'XX99',
    what: 'asks for the same as an earlier rule',
  });
});

test('a substance of the catalogue without hazard data is found out', () => {
  expect(findHazardDataFaults({ substances: SUBSTANCE_HAZARDS.slice(1) })).toHaveLength(1);
});

test('a group missing from the table is found out wherever it is named', () => {
  const faults = findHazardDataFaults({ groups: GROUPS.filter(({ id }) => id !== 'cyanide') });
  expect(faults.filter(({ what }) => what.includes('cyanide')).length).toBeGreaterThan(10);
});
