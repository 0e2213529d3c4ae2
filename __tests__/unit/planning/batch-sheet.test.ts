import fc from 'fast-check';
import { actualStrength, judgeTake } from '@/lib/planning/actual-strength';
import { planBatchSheet } from '@/lib/planning/batch-sheet';
import type { BatchSheetInput, SheetLot } from '@/lib/planning/batch-sheet-types';
import { buildRoom, buildSubstance } from './kit';

const vitriol = buildSubstance({
  id: 'copper-sulfate',
  name: 'copper(II) sulfate pentahydrate',
  cas: '7758-99-8',
  formula: 'CuSO4.5H2O',
  molarMassGPerMol: 249.677,
  releases: { 'Cu+2': 1, 'SO4-2': 1 },
});
const oilOfVitriol = buildSubstance({
  id: 'sulfuric-acid',
  name: 'sulfuric acid 96 %',
  cas: '7664-93-9',
  formula: 'H2SO4',
  molarMassGPerMol: 98.072,
  form: 'liquid or solution',
  assayPercent: 96,
  densityGPerMl: 1.84,
  releases: { 'H+': 2, 'SO4-2': 1 },
});

function buildLot(given: Partial<SheetLot> = {}): SheetLot {
  return {
    id: 'lot-1',
    code: 'L-0001',
    unit: 'g',
    balanceMicro: 500_000_000,
    expiresOn: null,
    receivedOn: '2026-01-05',
    held: false,
    substance: vitriol,
    place: 'Shelf 3',
    assayPercent: 100,
    densityGPerMl: null,
    ...given,
  };
}
function buildInput(given: Partial<BatchSheetInput> = {}): BatchSheetInput {
  return {
    solution: {
      name: 'copper(II) sulfate',
      solutes: [{ substance: vitriol, molarity: 0.1, solubleMolarity: 1.3 }],
      expected: { pH: 4, colour: 'clear blue' },
    },
    volumeMl: 1000,
    lots: [buildLot()],
    equipment: buildRoom(),
    tolerance: 'ordinary',
    onDay: '2026-12-03',
    hazards: [],
    conditions: [],
    ...given,
  };
}
const acidInput = (volumeMl = 1000) =>
  buildInput({
    solution: {
      name: 'sulfuric acid',
      solutes: [{ substance: oilOfVitriol, molarity: 1, solubleMolarity: null }],
      expected: { pH: null, colour: null },
    },
    volumeMl,
    lots: [buildLot({ substance: oilOfVitriol, unit: 'mL', assayPercent: null })],
  });
const planned = (sheet: ReturnType<typeof planBatchSheet>) =>
  sheet.takes.map(({ position, targetMicro }) => ({ position, amountMicro: targetMicro }));

describe('batch sheet', () => {
  test('one litre of 0.1 mol/L copper(II) sulfate takes 24.97 g (common recipe), in the digits of the balance', () => {
    const sheet = planBatchSheet(buildInput());
    expect(sheet.takes).toHaveLength(1);
    expect(Math.abs((sheet.takes[0]?.massG ?? 0) - 24.97)).toBeLessThan(0.0075);
    expect(sheet.takes[0]?.amountText).toMatch(/^24\.97 g$/);
    expect(sheet.takes[0]?.lotCode).toBe('L-0001');
    expect(sheet.warnings).toEqual([]);
    expect(sheet.questions).toEqual([]);
    expect(sheet.shortages).toEqual([]);
  });

  test('1 mol/L sulfuric acid takes 55.5 mL of 96 % acid (reagent table), poured into water in portions', () => {
    const sheet = planBatchSheet(acidInput());
    expect(Math.abs((sheet.takes[0]?.volumeMl ?? 0) - 55.5)).toBeLessThan(0.3);
    const texts = sheet.steps.map((step) => step.text);
    const water = texts.findIndex((text) => text.startsWith('Put about'));
    const acid = texts.findIndex((text) => text.includes('never water into the acid'));
    expect(water).toBeGreaterThanOrEqual(0);
    expect(acid).toBeGreaterThan(water);
    expect(texts[acid]).toMatch(/in \d+ portions/);
  });

  test('heat near boiling is said, with iced water, and nothing is drawn up by mouth', () => {
    const strong = planBatchSheet({
      ...acidInput(500),
      solution: {
        name: 'sulfuric acid',
        solutes: [{ substance: oilOfVitriol, molarity: 9, solubleMolarity: null }],
        expected: { pH: null, colour: null },
      },
    });
    const acid = strong.steps.find((step) => step.text.includes('never water into the acid'))?.text ?? '';
    expect(acid).toContain('iced water');
    expect(acid).toContain('boil and spit');
    const trace = planBatchSheet({
      ...acidInput(1000),
      solution: {
        name: 'sulfuric acid',
        solutes: [{ substance: oilOfVitriol, molarity: 0.005, solubleMolarity: null }],
        expected: { pH: null, colour: null },
      },
    });
    const pipetted = trace.steps.filter((step) => /With the .* pipette/.test(step.text));
    expect(pipetted.length).toBeGreaterThan(0);
    for (const step of pipetted) expect(step.text).toContain('a filler');
  });

  test('a low assay takes more, a split over lots corrects each for its own', () => {
    const input = buildInput({
      lots: [
        buildLot({
          id: 'old',
          code: 'L-0002',
          expiresOn: '2027-01-01',
          balanceMicro: 10_000_000,
          assayPercent: 90,
        }),
        buildLot({ assayPercent: 98 }),
      ],
    });
    const sheet = planBatchSheet(input);
    expect(sheet.takes.map((line) => line.lotCode)).toEqual(['L-0002', 'L-0001']);
    const pureG = sheet.takes.reduce((sum, line) => sum + (line.massG * line.assayPercent) / 100, 0);
    expect(Math.abs(pureG - 24.9677)).toBeLessThan(1e-4);
  });

  test('held, expired and missing lots are said, and what is short is a shortage', () => {
    const sheet = planBatchSheet(
      buildInput({
        lots: [
          buildLot({ held: true }),
          buildLot({ id: 'b', code: 'L-0003', expiresOn: '2026-12-02' }),
          buildLot({ id: 'c', code: 'L-0004', balanceMicro: 20_000_000 }),
        ],
      }),
    );
    expect(sheet.passedOver.map(({ lotCode, reason }) => [lotCode, reason])).toEqual([
      ['L-0003', 'expired'],
      ['L-0001', 'held'],
    ]);
    expect(sheet.shortages).toHaveLength(1);
    expect(Math.abs((sheet.shortages[0]?.shortMicro ?? 0) / 1e6 - 4.9677)).toBeLessThan(1e-4);
    expect(sheet.strengths[0]?.budget).toBeNull();
    expect(planBatchSheet(buildInput({ lots: [] })).shortages).toHaveLength(1);
  });

  test('too little to weigh becomes a stock, and the strength is unchanged by the detour', () => {
    const sheet = planBatchSheet(
      buildInput({
        volumeMl: 100,
        solution: {
          name: 'trace',
          solutes: [{ substance: vitriol, molarity: 0.0001, solubleMolarity: 1.3 }],
          expected: { pH: null, colour: null },
        },
      }),
    );
    const [line] = sheet.takes;
    expect(line?.massG).toBeGreaterThanOrEqual(0.2);
    expect(((line?.massG ?? 0) * (line?.carriedShare ?? 0)) / 249.677 / 0.1).toBeCloseTo(0.0001, 8);
    expect(sheet.steps.some((step) => step.text.startsWith('Stock of'))).toBe(true);
    expect(sheet.strengths[0]?.budget?.relativeExpandedUncertainty).toBeLessThanOrEqual(0.01);
  });

  test('protection, conditions and checks frame the work', () => {
    const sheet = planBatchSheet(
      buildInput({ hazards: [{ code: 'H318', text: '', because: '' }], conditions: ['Two people present'] }),
    );
    const kinds = sheet.steps.map((step) => step.kind);
    expect(kinds).toEqual(
      [...kinds].sort(
        (a, b) =>
          ['protection', 'condition', 'work', 'check'].indexOf(a) -
          ['protection', 'condition', 'work', 'check'].indexOf(b),
      ),
    );
    expect(sheet.steps.some((step) => step.kind === 'condition' && step.text === 'Two people present')).toBe(
      true,
    );
    expect(sheet.steps.some((step) => step.text.includes('(H318)'))).toBe(true);
    expect(
      sheet.steps
        .filter((step) => step.kind === 'check')
        .map((step) => step.text)
        .join(' '),
    ).toContain('clear blue');
  });

  test('a room without glass or balances still gets a sheet that says so', () => {
    const sheet = planBatchSheet(buildInput({ equipment: [] }));
    expect(sheet.vessel.meetsTolerance).toBe(false);
    expect(sheet.warnings.length).toBeGreaterThan(0);
    expect(sheet.strengths[0]?.budget).toBeNull();
  });

  test('is plain JSON, and the same input gives the same sheet', () => {
    const sheet = planBatchSheet(acidInput());
    expect(JSON.parse(JSON.stringify(sheet))).toEqual(sheet);
    expect(planBatchSheet(acidInput())).toEqual(sheet);
  });

  test('what is no batch is refused', () => {
    for (const volumeMl of [0, -1, Number.NaN, Number.POSITIVE_INFINITY])
      expect(() => planBatchSheet(buildInput({ volumeMl }))).toThrow(RangeError);
    expect(() => planBatchSheet(buildInput({ onDay: '2026-02-30' }))).toThrow(RangeError);
    expect(() =>
      planBatchSheet(
        buildInput({ solution: { name: 'water', solutes: [], expected: { pH: 7, colour: null } } }),
      ),
    ).toThrow(RangeError);
    expect(() => planBatchSheet(buildInput({ lots: [buildLot({ assayPercent: 0 })] }))).toThrow(RangeError);
  });
});

describe('what was really made', () => {
  test('taking exactly what the sheet says gives the strength asked for, within its digits', () => {
    for (const input of [buildInput(), acidInput(), acidInput(250)]) {
      const sheet = planBatchSheet(input);
      const outcome = actualStrength(sheet, { takes: planned(sheet), volumeMl: null });
      expect(Math.abs(outcome.strengths[0]?.deviationPercent ?? 100)).toBeLessThan(0.5);
      expect(outcome.verdict).toBe('within');
      const expanded = outcome.strengths[0]?.expandedUncertainty ?? 0;
      expect(expanded).toBeGreaterThan(0);
      expect(expanded / (outcome.strengths[0]?.molarity ?? 1)).toBeLessThan(0.01);
    }
  });

  test('24.000 g instead of 24.97 g: 0.09612 mol/L by hand, -3.9 %, to be remade at 1 % and within at 5 %', () => {
    for (const [tolerance, verdict] of [
      ['ordinary', 'remake'],
      ['bench', 'within'],
    ] as const) {
      const sheet = planBatchSheet(buildInput({ tolerance }));
      const outcome = actualStrength(sheet, {
        takes: [{ position: 1, amountMicro: 24_000_000 }],
        volumeMl: null,
      });
      expect(outcome.strengths[0]?.molarity).toBeCloseTo(24 / 249.677, 5);
      expect(outcome.strengths[0]?.deviationPercent).toBeCloseTo(-3.88, 1);
      expect(outcome.verdict).toBe(verdict);
    }
  });

  test('verdicts: within up to the tolerance, explain up to twice, remake beyond', () => {
    const sheet = planBatchSheet(buildInput());
    const [line] = sheet.takes;
    if (line === undefined) throw new Error('no line');
    const judged = [0.99, 1.01, 0.985, 1.02, 0.979, 1.5, 0].map((share) =>
      judgeTake(line, 0.01, Math.round(share * line.targetMicro)),
    );
    expect(judged).toEqual(['within', 'within', 'explain', 'explain', 'remake', 'remake', 'remake']);
  });

  test('strength is proportional to what was taken, inversely to what was made', () => {
    const sheet = planBatchSheet(buildInput());
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 100_000_000 }),
        fc.double({ min: 100, max: 3000, noNaN: true }),
        (amountMicro, volumeMl) => {
          const molarity =
            actualStrength(sheet, { takes: [{ position: 1, amountMicro }], volumeMl }).strengths[0]
              ?.molarity ?? 0;
          expect((molarity * volumeMl * 249.677) / 1000 / (amountMicro / 1e6)).toBeCloseTo(1, 9);
        },
      ),
    );
  });

  test('missing and impossible entries are refused', () => {
    const sheet = planBatchSheet(buildInput());
    expect(() => actualStrength(sheet, { takes: [], volumeMl: null })).toThrow(RangeError);
    expect(() =>
      actualStrength(sheet, { takes: [{ position: 1, amountMicro: 1.5 }], volumeMl: null }),
    ).toThrow(RangeError);
    expect(() => actualStrength(sheet, { takes: planned(sheet), volumeMl: 0 })).toThrow(RangeError);
  });
});
