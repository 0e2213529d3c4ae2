import type { Portion } from '../../../lib/chemistry/types';
import { gravityOf } from '../../../lib/domain/gravity';
import { previewMix } from '../../../lib/hazards/preview';
import { editDistance, similarlyNamed, slipVariants } from '../../../lib/hazards/slip-variants';
import { checkSlips } from '../../../lib/hazards/slips';

const ROOM = { volumeM3: 150, airChangesPerHour: 6, fumeCupboard: false };
const portion = (label: string, volumeMl: number, ...solutes: (readonly [string, number])[]): Portion => ({
  label,
  volumeMl,
  solutes: solutes.map(([substance, molarity]) => ({ substance, molarity })),
});
const slipsOf = (portions: readonly Portion[], others: readonly Portion[] = []) =>
  checkSlips({ portions, others, activity: 'davies', temperatureC: 25, room: ROOM });

test.each([
  ['nitrate', 'nitrite', 1],
  ['chlorate', 'chloride', 2],
  ['', 'abc', 3],
  ['kitten', 'sitting', 3],
])('%s and %s differ by %d letters', (a, b, letters) => {
  expect(editDistance(a, b)).toBe(letters);
});

test('names easily misread are found from the catalogue', () => {
  expect(similarlyNamed('sodium-nitrate').map(({ id }) => id)).toContain('sodium-nitrite');
  expect(similarlyNamed('sodium-sulfite').map(({ id }) => id)).toEqual(
    expect.arrayContaining(['sodium-sulfide', 'sodium-sulfate']),
  );
  expect(similarlyNamed('sodium-chloride').map(({ id }) => id)).not.toContain('silver-nitrate');
});

test('sulfide taken for sulfate meets the acid', () => {
  const { raised } = slipsOf([
    portion('sulfate', 10, ['sodium-sulfate', 0.5]),
    portion('acid', 10, ['hydrochloric-acid', 1]),
  ]);
  expect(raised[0]).toMatchObject({ kind: 'wrong-substance', decision: 'review' });
  expect(raised[0]?.sentence).toMatch(
    /^If sodium sulfide.* is taken for sodium sulfate.* in sulfate, .*hydrogen sulfide/,
  );
});

test('a neighbouring bottle taken by mistake is found, and the remedy is to keep it off the trolley', () => {
  const report = slipsOf(
    [portion('bleach', 10, ['sodium-hypochlorite', 0.1]), portion('salt', 10, ['sodium-chloride', 0.1])],
    [portion('ammonia', 250, ['ammonia-solution', 2])],
  );
  expect(
    report.raised.find(({ kind, concerns }) => kind === 'wrong-bottle' && concerns.includes('salt')),
  ).toMatchObject({ decision: 'stop' });
  expect(report.stops).toBeGreaterThan(0);
  expect(report.summary).toMatch(/^\d+ of \d+ single slips leads? to a stop\.$/);
});

test('ammoniacal silver must not stand overnight, and fresh it is only controlled', () => {
  const report = slipsOf([
    portion('silver', 5, ['silver-nitrate', 0.1]),
    portion('ammonia', 5, ['ammonia-solution', 2]),
  ]);
  expect(report.raised.find(({ kind }) => kind === 'overnight')).toMatchObject({
    decision: 'stop',
    finding: { rule: 'AG02' },
  });
  expect(report.separation).not.toBeNull();
});

test('ten times too strong never means stronger than the goods as sold', () => {
  const [strong] = slipVariants([portion('ammonia', 10, ['ammonia-solution', 2])], []).filter(
    ({ kind }) => kind === 'too-strong',
  );
  expect(strong?.portions[0]?.solutes[0]?.molarity).toBeGreaterThan(13);
  expect(strong?.portions[0]?.solutes[0]?.molarity).toBeLessThan(19);
});

test('salt and saltpetre forgive every slip', () => {
  const report = slipsOf([
    portion('salt', 25, ['sodium-chloride', 0.1]),
    portion('saltpetre', 25, ['potassium-nitrate', 0.1]),
  ]);
  expect(report.raised).toEqual([]);
  expect(report.separation).toBeNull();
  expect(report.tried).toBeGreaterThan(10);
});

test('what is reported is graver than what is intended, gravest first, and each says why in a sentence', () => {
  const portions = [
    portion('iodide', 20, ['potassium-iodide', 0.1]),
    portion('peroxide', 20, ['hydrogen-peroxide', 0.3]),
    portion('acid', 10, ['sulfuric-acid', 1]),
  ];
  const preview = previewMix({ portions, activity: 'davies', temperatureC: 25, room: ROOM, slips: true });
  if (!('decision' in preview) || !preview.slips) throw new Error('no slips');
  const gravities = preview.slips.raised.map(({ decision }) => gravityOf(decision));
  expect(gravities).toEqual([...gravities].sort((a, b) => a - b));
  for (const { sentence, decision } of preview.slips.raised) {
    expect(sentence).toMatch(/^If .+, .+: .+\.$/);
    expect(gravityOf(decision)).toBeLessThan(gravityOf(preview.decision));
  }
});

test('slips are tried only where asked for', () => {
  const preview = previewMix({
    portions: [portion('salt', 10, ['sodium-chloride', 0.1])],
    activity: 'davies',
    temperatureC: 25,
    room: ROOM,
  });
  expect('slips' in preview).toBe(false);
});

test('three demonstrations on a trolley of ten bottles are checked within a second', () => {
  const bottles = [
    portion('silver', 25, ['silver-nitrate', 0.1]),
    portion('salt', 25, ['sodium-chloride', 0.1]),
    portion('ammonia', 25, ['ammonia-solution', 2]),
    portion('copper', 25, ['copper-sulfate', 0.1]),
    portion('alkali', 25, ['sodium-hydroxide', 0.1]),
    portion('acid', 25, ['hydrochloric-acid', 0.1]),
    portion('iodide', 25, ['potassium-iodide', 0.1]),
    portion('lead', 25, ['lead-nitrate', 0.1]),
    portion('carbonate', 25, ['sodium-carbonate', 0.1]),
    portion('iron', 25, ['iron-iii-chloride', 0.1]),
  ];
  slipsOf(bottles.slice(0, 2));
  const startedAt = performance.now();
  for (const [first, second] of [
    [0, 1],
    [3, 2],
    [7, 6],
  ] as const) {
    slipsOf(
      [bottles[first], bottles[second]].filter((entry) => entry !== undefined),
      bottles.filter((_, at) => at !== first && at !== second),
    );
  }
  expect(performance.now() - startedAt).toBeLessThan(1000);
});
