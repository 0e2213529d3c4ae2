import { solutionNeeds, substanceNeeds } from '@/lib/planning/request-need';
import { questionQuantities } from '@/lib/planning/sanity';
import { buildSubstance } from './kit';

const silver = buildSubstance({
  id: 'silver-nitrate',
  name: 'silver nitrate',
  formula: 'AgNO3',
  molarMassGPerMol: 169.872,
});
const codes = (
  molarity: number,
  volumeMl: number,
  substance = silver,
  solubleMolarity: number | null = null,
) =>
  questionQuantities({ solutes: [{ substance, molarity, solubleMolarity }], volumeMl }).map(
    (question) => question.code,
  );

describe('quantities that a person should look at again', () => {
  test('500 mol/L, 3 kg of silver nitrate, and a strength above solubility are questioned', () => {
    expect(codes(500, 100)).toContain('impossible-strength');
    expect(codes(1, 3000 / 0.169872)).toContain('large-mass');
    expect(codes(1.5, 100, silver, 0.5)).toContain('above-solubility');
    expect(
      codes(
        13,
        100,
        buildSubstance({
          formula: 'HCl',
          molarMassGPerMol: 36.458,
          form: 'liquid or solution',
          assayPercent: 37,
          densityGPerMl: 1.18,
        }),
      ),
    ).toContain('impossible-strength');
  });

  test('litres written as millilitres and the other way round are questioned', () => {
    expect(codes(0.1, 100_000)).toContain('unusual-volume');
    expect(codes(0.1, 0.5)).toEqual(['unusual-volume']);
    expect(codes(1e-8, 100)).toEqual(['unusual-strength']);
  });

  test('what is no number is a question, not a crash, and ordinary requests raise none', () => {
    for (const bad of [Number.NaN, 0, -3, Number.POSITIVE_INFINITY]) {
      expect(codes(bad, 100)).toEqual(['not-a-quantity']);
      expect(codes(0.1, bad)).toContain('not-a-quantity');
    }
    expect(codes(0.1, 500)).toEqual([]);
    expect(
      codes(
        6,
        1000,
        buildSubstance({
          formula: 'HCl',
          molarMassGPerMol: 36.458,
          form: 'liquid or solution',
          assayPercent: 37,
          densityGPerMl: 1.18,
        }),
      ),
    ).toEqual([]);
  });
});

describe('what a session needs', () => {
  test('per bench times benches and spare, and portions times performances, by solution', () => {
    const needs = solutionNeeds(
      [
        { kind: 'solution', solutionId: 'ammonia', volumePerBenchMl: 25, spareBenches: 2 },
        {
          kind: 'demonstration',
          demonstrationId: 'blue',
          portions: [
            { solutionId: 'ammonia', volumeMl: 60 },
            { solutionId: 'copper', volumeMl: 50 },
          ],
          performances: 3,
        },
      ],
      12,
    );
    expect(needs.map(({ solutionId, volumeMl }) => [solutionId, volumeMl])).toEqual([
      ['ammonia', 25 * 14 + 180],
      ['copper', 150],
    ]);
    expect(needs[0]?.parts).toHaveLength(2);
  });

  test('solutes of the same substance add up, whichever name they were given by', () => {
    const salt = buildSubstance();
    const find = (name: string) => (name === 'sodium-chloride' || name === '7647-14-5' ? salt : null);
    const needs = substanceNeeds(
      [
        { volumeMl: 500, solutes: [{ substance: 'sodium-chloride', molarity: 0.1 }] },
        { volumeMl: 1000, solutes: [{ substance: '7647-14-5', molarity: 0.05 }] },
      ],
      find,
    );
    expect(needs).toHaveLength(1);
    // 0.1 mol of sodium chloride.
    expect(needs[0]?.pureG).toBeCloseTo(5.844, 6);
    expect(() =>
      substanceNeeds([{ volumeMl: 1, solutes: [{ substance: 'unobtainium', molarity: 1 }] }], find),
    ).toThrow(RangeError);
  });

  test('counts that are no whole numbers and volumes that are not positive are refused', () => {
    const line = { kind: 'solution' as const, solutionId: 'a', volumePerBenchMl: 10, spareBenches: 0 };
    expect(() => solutionNeeds([line], 0)).toThrow(RangeError);
    expect(() => solutionNeeds([line], 2.5)).toThrow(RangeError);
    expect(() => solutionNeeds([{ ...line, volumePerBenchMl: -1 }], 2)).toThrow(RangeError);
    expect(() => solutionNeeds([{ ...line, spareBenches: 0.5 }], 2)).toThrow(RangeError);
    expect(() =>
      solutionNeeds([{ kind: 'demonstration', demonstrationId: 'd', portions: [], performances: 0 }], 2),
    ).toThrow(RangeError);
  });
});
