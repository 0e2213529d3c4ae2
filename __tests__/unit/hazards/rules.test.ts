import { pourMix } from '../../../lib/chemistry/mixing';
import { ALL_SUBSTANCES, findSubstance } from '../../../lib/chemistry/substances';
import type { Portion } from '../../../lib/chemistry/types';
import { gravityOf } from '../../../lib/domain/gravity';
import { groupsAt, screenedBottle } from '../../../lib/hazards/contents';
import type { ScreenedBottle } from '../../../lib/hazards/contents';
import { firingRules } from '../../../lib/hazards/rules';
import { screenMix } from '../../../lib/hazards/screen';
import { findSubstanceHazards, HAZARD_RULES } from '../../../lib/hazards/tables';
import type { HazardRule } from '../../../lib/hazards/tables';

const ROOM = { volumeM3: 150, airChangesPerHour: 6, fumeCupboard: false };
const portion = (label: string, volumeMl: number, ...solutes: (readonly [string, number])[]): Portion => ({
  label,
  volumeMl,
  solutes: solutes.map(([substance, molarity]) => ({ substance, molarity })),
});

/** One solution for each group of a rule, of the strength it asks for, made of a real substance where its form matters. */
function bottleFor(rule: HazardRule, group: string): ScreenedBottle {
  const { conditions } = rule;
  const isOfForm = (id: string) => {
    if (conditions.form === 'hydrogencarbonate' && group === 'carbonate')
      return id === 'sodium-hydrogencarbonate';
    if (group !== 'ammonia_or_ammonium') return true;
    return conditions.form === 'ammonium-salt' ? id === 'ammonium-nitrate' : id === 'ammonia-solution';
  };
  const substance =
    ALL_SUBSTANCES.find(({ id }) => findSubstanceHazards(id)?.groups.includes(group) && isOfForm(id)) ??
    findSubstance('sodium-chloride');
  if (!substance) throw new Error('no substance');
  const molarity =
    conditions.strongerThanMolarity === undefined
      ? Math.min(1, conditions.weakerThanMolarity ?? 1)
      : conditions.strongerThanMolarity + 0.5;
  return {
    label: group,
    volumeMl: 10,
    unknown: [],
    solutes: [{ substance, molarity, amountMol: molarity / 100, groups: new Set([group]) }],
  };
}

function firesWith(
  rule: HazardRule,
  groups: readonly string[],
  isKept = rule.conditions.standing === 'over-an-hour',
): boolean {
  const bottles = groups.filter((group) => group !== 'water').map((group) => bottleFor(rule, group));
  const temperatureC = (rule.conditions.hotterThanC ?? 15) + 5;
  const meeting = {
    bottles,
    volumeMl: 10 * bottles.length + 1,
    state: null,
    temperatureC,
    isKept,
    room: ROOM,
  };
  return firingRules(
    rule.conditions.order
      ? { ...meeting, bottles: [...bottles, { label: 'water', volumeMl: 10, unknown: [], solutes: [] }] }
      : meeting,
  ).some(({ rule: { id } }) => id === rule.id);
}

/** Rules about solids, dry residues and old bottles speak of what is no solution as poured. */
const OF_SOLUTIONS = HAZARD_RULES.filter(
  ({ conditions: { form, standing } }) =>
    form !== 'solid' && form !== 'dry' && standing !== 'over-half-a-year',
);
/** A group that only a meeting makes cannot be left out alone. */
const MADE_BY_MEETING = new Set(['ammoniacal_silver', 'water']);

test('most rules speak of solutions, and those are the ones judged here', () => {
  expect(OF_SOLUTIONS.length).toBeGreaterThan(150);
});

describe.each(OF_SOLUTIONS.map((rule) => [rule.id, rule] as const))('%s', (_id, rule) => {
  test('fires where all its groups meet', () => {
    expect(firesWith(rule, rule.groups)).toBe(true);
  });
  test('does not fire where any one of them is missing', () => {
    for (const missing of rule.groups.filter((group) => !MADE_BY_MEETING.has(group))) {
      expect(
        firesWith(
          rule,
          rule.groups.filter((group) => group !== missing),
        ),
      ).toBe(false);
    }
  });
});

test('rules about solids and dry residues never fire on solutions', () => {
  for (const rule of HAZARD_RULES.filter(({ conditions: { form } }) => form === 'solid' || form === 'dry'))
    expect(firesWith(rule, rule.groups)).toBe(false);
});

function rulesOf(portions: readonly Portion[], temperatureC = 25): string[] {
  const mix = pourMix({ portions, activity: 'davies', temperatureC });
  if (!mix.converged) throw new Error('not converged');
  return screenMix(portions, mix, ROOM).map(({ rule }) => rule);
}

/** Conditions of rules with a mix that meets them and a near miss that does not. */
const NEAR_MISSES: readonly {
  readonly rule: string;
  readonly title: string;
  readonly fires: readonly Portion[];
  readonly misses: readonly Portion[];
  readonly warmC?: number;
}[] = [
  {
    rule: 'CN01',
    title: 'cyanide with acid, against cyanide with a trace of acid in much alkali',
    fires: [portion('a', 10, ['sodium-cyanide', 0.1]), portion('b', 10, ['hydrochloric-acid', 0.1])],
    misses: [
      portion('a', 10, ['sodium-cyanide', 0.1]),
      portion('b', 20, ['sodium-hydroxide', 0.1]),
      portion('c', 1, ['hydrochloric-acid', 0.1]),
    ],
  },
  {
    rule: 'CN01',
    title: 'cyanide with alum, against cyanide with silver nitrate',
    fires: [portion('a', 10, ['sodium-cyanide', 0.1]), portion('b', 10, ['potassium-alum', 0.1])],
    misses: [portion('a', 40, ['sodium-cyanide', 0.1]), portion('b', 25, ['silver-nitrate', 0.075])],
  },
  {
    rule: 'CN04',
    title: 'cyanide with an ammonium salt, against cyanide with ammonia',
    fires: [portion('a', 10, ['sodium-cyanide', 0.1]), portion('b', 10, ['ammonium-chloride', 0.1])],
    misses: [portion('a', 10, ['sodium-cyanide', 0.1]), portion('b', 10, ['ammonia-solution', 2])],
  },
  {
    rule: 'CN05',
    title: 'cyanide with hydrogencarbonate, against cyanide with carbonate',
    fires: [portion('a', 10, ['sodium-cyanide', 0.1]), portion('b', 10, ['sodium-hydrogencarbonate', 0.1])],
    misses: [portion('a', 10, ['sodium-cyanide', 0.1]), portion('b', 10, ['sodium-carbonate', 0.1])],
  },
  {
    rule: 'FC01',
    title: 'ferrocyanide with 6 mol/L acid, against 0.5 mol/L',
    fires: [portion('a', 10, ['potassium-ferrocyanide', 0.1]), portion('b', 10, ['sulfuric-acid', 6])],
    misses: [portion('a', 10, ['potassium-ferrocyanide', 0.1]), portion('b', 10, ['sulfuric-acid', 0.5])],
  },
  {
    rule: 'FC06',
    title: 'ferrocyanide with 2 mol/L acid, against 6 mol/L, which is a stop',
    fires: [portion('a', 10, ['potassium-ferrocyanide', 0.1]), portion('b', 10, ['hydrochloric-acid', 2])],
    misses: [portion('a', 10, ['potassium-ferrocyanide', 0.1]), portion('b', 10, ['hydrochloric-acid', 6])],
  },
  {
    rule: 'NI07',
    title: 'strong nitrite with an ammonium salt, against dilute',
    fires: [portion('a', 10, ['sodium-nitrite', 4]), portion('b', 10, ['ammonium-chloride', 4])],
    misses: [portion('a', 10, ['sodium-nitrite', 0.1]), portion('b', 10, ['ammonium-chloride', 0.1])],
  },
  {
    rule: 'PX07',
    title: 'permanganate with 3 % peroxide, against a titration',
    fires: [portion('a', 10, ['hydrogen-peroxide', 0.9]), portion('b', 10, ['potassium-permanganate', 0.02])],
    misses: [
      portion('a', 10, ['hydrogen-peroxide', 0.05]),
      portion('b', 10, ['potassium-permanganate', 0.02]),
    ],
  },
  {
    rule: 'SU01',
    title: 'sulfide with acid, against sulfide with alkali',
    fires: [portion('a', 10, ['sodium-sulfide', 0.1]), portion('b', 10, ['hydrochloric-acid', 1])],
    misses: [portion('a', 10, ['sodium-sulfide', 0.1]), portion('b', 10, ['sodium-hydroxide', 1])],
  },
  {
    rule: 'SO01',
    title: 'sulfite with acid, against sulfite with its own buffer',
    fires: [portion('a', 10, ['sodium-sulfite', 0.1]), portion('b', 10, ['hydrochloric-acid', 1])],
    misses: [portion('a', 10, ['sodium-sulfite', 0.1]), portion('b', 1, ['hydrochloric-acid', 0.1])],
  },
  {
    rule: 'SO03',
    title: 'thiosulfate with acid, against a trace of thiosulfate in a clock',
    fires: [portion('a', 10, ['sodium-thiosulfate', 0.1]), portion('b', 10, ['hydrochloric-acid', 1])],
    misses: [portion('a', 10, ['sodium-thiosulfate', 0.005]), portion('b', 10, ['hydrochloric-acid', 1])],
  },
  {
    rule: 'HY01',
    title: 'bleach with acid, against bleach with a drop of acid, still alkaline',
    fires: [portion('a', 10, ['sodium-hypochlorite', 0.7]), portion('b', 10, ['hydrochloric-acid', 1])],
    misses: [portion('a', 10, ['sodium-hypochlorite', 0.7]), portion('b', 0.1, ['hydrochloric-acid', 0.1])],
  },
  {
    rule: 'HY04',
    title: 'bleach with ammonia, against bleach with tris',
    fires: [portion('a', 10, ['sodium-hypochlorite', 0.7]), portion('b', 10, ['ammonia-solution', 0.5])],
    misses: [portion('a', 10, ['sodium-hypochlorite', 0.7]), portion('b', 10, ['tris', 0.5])],
  },
  {
    rule: 'NI01',
    title: 'nitrite with acid, against nitrate with acid',
    fires: [portion('a', 10, ['sodium-nitrite', 0.1]), portion('b', 10, ['hydrochloric-acid', 1])],
    misses: [portion('a', 10, ['sodium-nitrate', 0.1]), portion('b', 10, ['hydrochloric-acid', 1])],
  },
  {
    rule: 'PX02',
    title: 'strong peroxide with acetone, against 1 %',
    fires: [portion('a', 10, ['hydrogen-peroxide', 3]), portion('b', 10, ['acetone', 5])],
    misses: [portion('a', 10, ['hydrogen-peroxide', 0.3]), portion('b', 10, ['acetone', 1])],
  },
  {
    rule: 'PX10',
    title: 'peroxide in concentrated sulfuric acid, against 1 mol/L acid',
    fires: [portion('a', 10, ['hydrogen-peroxide', 9]), portion('b', 30, ['sulfuric-acid', 18])],
    misses: [portion('a', 10, ['hydrogen-peroxide', 0.3]), portion('b', 30, ['sulfuric-acid', 1])],
  },
  {
    rule: 'MN01',
    title: 'permanganate with hydrochloric acid, against sulfuric',
    fires: [portion('a', 10, ['potassium-permanganate', 0.02]), portion('b', 10, ['hydrochloric-acid', 2])],
    misses: [portion('a', 10, ['potassium-permanganate', 0.02]), portion('b', 10, ['sulfuric-acid', 1])],
  },
  {
    rule: 'MN08',
    title: 'permanganate with glacial ethanoic acid, against vinegar',
    fires: [portion('a', 10, ['potassium-permanganate', 0.02]), portion('b', 10, ['acetic-acid', 17])],
    misses: [portion('a', 10, ['potassium-permanganate', 0.02]), portion('b', 10, ['acetic-acid', 0.8])],
  },
  {
    rule: 'MN10',
    title: 'strong permanganate with ethanol, against dilute',
    fires: [portion('a', 10, ['potassium-permanganate', 0.2]), portion('b', 10, ['ethanol', 8])],
    misses: [portion('a', 10, ['potassium-permanganate', 0.01]), portion('b', 10, ['ethanol', 8])],
  },
  {
    rule: 'CR02',
    title: 'chromate with concentrated hydrochloric acid, against 1 mol/L',
    fires: [portion('a', 10, ['potassium-dichromate', 0.1]), portion('b', 10, ['hydrochloric-acid', 11])],
    misses: [portion('a', 10, ['potassium-dichromate', 0.1]), portion('b', 10, ['hydrochloric-acid', 1])],
  },
  {
    rule: 'HN01',
    title: 'concentrated nitric acid with ethanol, against 0.1 mol/L',
    fires: [portion('a', 10, ['nitric-acid', 15]), portion('b', 10, ['ethanol', 16])],
    misses: [portion('a', 10, ['nitric-acid', 0.1]), portion('b', 10, ['ethanol', 16])],
  },
  {
    rule: 'HT01',
    title: 'water into strong acid, against acid into water',
    fires: [portion('a', 20, ['sulfuric-acid', 18]), portion('b', 80)],
    misses: [portion('b', 80), portion('a', 20, ['sulfuric-acid', 18])],
  },
  {
    rule: 'HT03',
    title: 'acid and alkali of 1 mol/L, against 0.1',
    fires: [portion('a', 10, ['hydrochloric-acid', 1]), portion('b', 10, ['sodium-hydroxide', 1])],
    misses: [portion('a', 10, ['hydrochloric-acid', 0.1]), portion('b', 10, ['sodium-hydroxide', 0.1])],
  },
  {
    rule: 'HT10',
    title: 'fluoride with acid, against fluoride in water',
    fires: [portion('a', 10, ['sodium-fluoride', 0.1]), portion('b', 10, ['hydrochloric-acid', 1])],
    misses: [portion('a', 10, ['sodium-fluoride', 0.1]), portion('b', 10, ['sodium-chloride', 1])],
  },
  {
    rule: 'AG01',
    title: 'silver with ammonia, against silver with an ammonium salt',
    fires: [portion('a', 5, ['silver-nitrate', 0.1]), portion('b', 5, ['ammonia-solution', 2])],
    misses: [portion('a', 5, ['silver-nitrate', 0.1]), portion('b', 5, ['ammonium-nitrate', 1])],
  },
  {
    rule: 'AG03',
    title: 'silver, ammonia and alkali, against silver, ammonia and salt',
    fires: [
      portion('a', 5, ['silver-nitrate', 0.1]),
      portion('b', 5, ['ammonia-solution', 2]),
      portion('c', 1, ['sodium-hydroxide', 1]),
    ],
    misses: [
      portion('a', 5, ['silver-nitrate', 0.1]),
      portion('b', 5, ['ammonia-solution', 2]),
      portion('c', 1, ['sodium-chloride', 1]),
    ],
  },
  {
    rule: 'AG04',
    title: 'the mirror test, against silver with glucose in water',
    fires: [
      portion('a', 5, ['silver-nitrate', 0.1]),
      portion('b', 5, ['ammonia-solution', 2]),
      portion('c', 5, ['glucose', 0.5]),
    ],
    misses: [portion('a', 5, ['silver-nitrate', 0.1]), portion('c', 5, ['glucose', 0.5])],
  },
  {
    rule: 'AZ05',
    title: 'azide with acid, against azide with alkali',
    fires: [portion('a', 5, ['sodium-azide', 0.1]), portion('b', 5, ['hydrochloric-acid', 0.1])],
    misses: [portion('a', 5, ['sodium-azide', 0.1]), portion('b', 5, ['sodium-hydroxide', 0.1])],
  },
  {
    rule: 'IO01',
    title: 'iodine with ammonia, against iodine with an ammonium salt',
    fires: [
      portion('a', 5, ['iodine', 0.05], ['potassium-iodide', 0.2]),
      portion('b', 5, ['ammonia-solution', 5]),
    ],
    misses: [
      portion('a', 5, ['iodine', 0.05], ['potassium-iodide', 0.2]),
      portion('b', 5, ['ammonium-chloride', 1]),
    ],
  },
  {
    rule: 'IO01',
    title: 'iodine with strong ammonia, against dilute',
    fires: [
      portion('a', 5, ['iodine', 0.05], ['potassium-iodide', 0.2]),
      portion('b', 5, ['ammonia-solution', 2]),
    ],
    misses: [
      portion('a', 5, ['iodine', 0.01], ['potassium-iodide', 0.2]),
      portion('b', 5, ['ammonia-solution', 0.1]),
    ],
  },
  {
    rule: 'HZ02',
    title: 'hydrazine with strong peroxide, against dilute',
    fires: [portion('a', 5, ['hydrazine-sulfate', 0.1]), portion('b', 5, ['hydrogen-peroxide', 9])],
    misses: [portion('a', 5, ['hydrazine-sulfate', 0.1]), portion('b', 5, ['hydrogen-peroxide', 0.3])],
  },
];

test.each(NEAR_MISSES.map((entry) => [entry.rule, entry.title, entry] as const))(
  '%s: %s',
  (rule, _title, { fires, misses }) => {
    expect(rulesOf(fires)).toContain(rule);
    expect(rulesOf(misses)).not.toContain(rule);
  },
);

test('heat changes the judgement of ferrocyanide in dilute acid', () => {
  const portions = [
    portion('a', 10, ['potassium-ferrocyanide', 0.1]),
    portion('b', 10, ['hydrochloric-acid', 0.5]),
  ];
  expect(rulesOf(portions, 25)).toContain('FC02');
  expect(rulesOf(portions, 25)).not.toContain('FC05');
  expect(rulesOf(portions, 60)).toContain('FC05');
});

test('an unknown composition counts as meeting every condition on pH', () => {
  const bottles = [
    portion('a', 10, ['sodium-cyanide', 0.1]),
    portion('b', 0.01, ['hydrochloric-acid', 0.1]),
  ].map(screenedBottle);
  expect(
    firingRules({ bottles, volumeMl: 10, state: null, temperatureC: 25, isKept: false, room: ROOM })[0],
  ).toMatchObject({ rule: { id: 'CN01' }, severity: 'stop' });
});

test('strength decides the group of an acid, and dilution takes it away', () => {
  expect([...groupsAt('nitric-acid', 15)]).toEqual(
    expect.arrayContaining(['acid_mineral_ox', 'concentrated_acid', 'acid_mineral_nonox']),
  );
  expect([...groupsAt('nitric-acid', 0.1)]).toEqual(['acid_mineral_nonox']);
  expect(groupsAt('sulfuric-acid', 18).has('sulfuric_conc')).toBe(true);
  expect(groupsAt('sulfuric-acid', 1).has('sulfuric_conc')).toBe(false);
  expect(groupsAt('potassium-nitrate', 0.1).size).toBe(0);
});

test('formaldehyde counts as an aldehyde too', () => {
  expect(groupsAt('formaldehyde-solution', 1).has('aldehyde')).toBe(true);
});

test('findings come gravest first', () => {
  const bottles = [
    portion('a', 10, ['sodium-cyanide', 0.1]),
    portion('b', 10, ['nitric-acid', 5]),
    portion('c', 10, ['sodium-carbonate', 0.1]),
  ].map(screenedBottle);
  const gravities = firingRules({
    bottles,
    volumeMl: 30,
    state: null,
    temperatureC: 25,
    isKept: false,
    room: ROOM,
  }).map(({ severity }) => gravityOf(severity));
  expect(gravities.length).toBeGreaterThan(2);
  expect(gravities).toEqual([...gravities].sort((a, b) => a - b));
});
