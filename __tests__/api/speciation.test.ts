import type { Response } from 'supertest';
import type { EquilibriumState } from '@/lib/chemistry/types';
import type { MixAnswer } from '@/lib/schemas/mixes';
import { bodyOf, nobody, pointersOf, problemOf, signIn } from '../support/api';
import type { Caller } from '../support/api';

const PATH = '/api/speciation';
let person: Caller;

beforeAll(async () => {
  person = await signIn('instructor');
});

const compute = async (body: object) => bodyOf<EquilibriumState>(await person.post(PATH, body));
const molarity = (state: EquilibriumState, id: string) =>
  state.species.find((species) => species.id === id)?.molarity ?? NaN;
const bare = (amounts: Record<string, number>, reactions: object[]) => ({
  activity: 'ideal',
  amounts,
  reactions,
});

/** Relative difference allowed to a figure that was written down with so many digits. */
const close = (value: number, figure: number, relative: number) =>
  expect(Math.abs(value - figure) / figure).toBeLessThan(relative);

describe('figures worked by hand on bare, ideal systems', () => {
  it('copper(II) in ammonia: driven to completion, then back', async () => {
    const state = await compute(
      bare({ 'Cu+2': 0.2, NH3: 0.5 }, [
        { species: 'Cu(NH3)4+2', phase: 'aq', stoich: { 'Cu+2': 1, NH3: 4 }, logK: Math.log10(1.7e13) },
      ]),
    );
    close(molarity(state, 'Cu(NH3)4+2'), 0.12486, 1e-4);
    close(molarity(state, 'NH3'), 5.59e-4, 2e-3);
    close(molarity(state, 'Cu+2'), 0.07514, 1e-4);
    expect(state.pH).toBeNull();
  });

  it('silver in cyanide: the free cyanide is about 4.5e-11 mol/L', async () => {
    const state = await compute(
      bare({ 'Ag+': 0.0288, 'CN-': 0.0385 }, [
        { species: 'Ag(CN)2-', phase: 'aq', stoich: { 'Ag+': 1, 'CN-': 2 }, logK: 21 },
      ]),
    );
    close(molarity(state, 'CN-'), 4.5e-11, 0.02);
    close(molarity(state, 'Ag(CN)2-'), 0.01925, 1e-3);
  });

  it('lead iodide: the physical root, never the one of hundreds of mol/L', async () => {
    const reactions = [
      { species: 'PbI2(s)', phase: 's', stoich: { 'Pb+2': 1, 'I-': 2 }, logK: -Math.log10(9.8e-9) },
      { species: 'PbI4-2', phase: 'aq', stoich: { 'Pb+2': 1, 'I-': 4 }, logK: Math.log10(3e4) },
    ];
    const state = await compute(bare({ 'Pb+2': 0.1, 'I-': 0.2 }, reactions));
    close(molarity(state, 'Pb+2'), 0.00135, 5e-3);
    close(molarity(state, 'I-'), 0.0027, 5e-3);
    close(molarity(state, 'PbI4-2'), 2.1e-9, 0.05);
    for (const species of state.species) expect(species.molarity).toBeLessThan(0.01);
    expect(state.solids).toHaveLength(1);
    expect(state.solids[0]?.moles).toBeGreaterThan(0.098);
  });

  it('25 mL of silver nitrate with 40 mL of sodium cyanide dilute by the volume of both', async () => {
    const mix = bodyOf<MixAnswer>(
      await person.post('/api/mixes/preview', {
        portions: [
          { label: 'A', solutes: [{ substance: '7761-88-8', molarity: 0.075 }], volumeMl: 25 },
          { label: 'B', solutes: [{ substance: '143-33-9', molarity: 0.1 }], volumeMl: 40 },
        ],
      }),
    );
    expect(mix.finalVolumeMl).toBeCloseTo(65, 9);
    close(mix.diluted[0]?.molarity ?? NaN, 0.02885, 1e-3);
    close(mix.diluted[1]?.molarity ?? NaN, 0.06154, 1e-3);
    // two cyanides bind each silver; 0.06154 − 2 × 0.02885 = 0.0038 mol/L is left over
    const cyanide = ['CN-', 'HCN', 'HCN(aq)'].reduce(
      (sum, id) => sum + (mix.equilibrium.species.find((species) => species.id === id)?.molarity ?? 0),
      0,
    );
    expect(cyanide).toBeGreaterThan(0.002);
    expect(cyanide).toBeLessThan(0.0039);
  });
});

describe('what is left unsaid', () => {
  it('is a litre at 25 °C of the whole catalogue, with activities by Davies', async () => {
    const state = await compute({ amounts: { 'Cu+2': 0.01, 'SO4-2': 0.01 } });
    expect(state).toMatchObject({ converged: true, activity: 'davies', temperatureC: 25 });
    expect(state.species.find(({ id }) => id === 'Cu+2')?.gamma).toBeLessThan(1);
    expect(state.species.some(({ id }) => id === 'CuSO4' || id === 'CuSO4(aq)')).toBe(true);
    expect(state.pH).not.toBeNull();
  });

  it('a held pH is held, and the amounts still balance', async () => {
    const state = await compute({ amounts: { 'Cu+2': 0.01, NH3: 0.1 }, pH: 9 });
    expect(state.pH).toBeCloseTo(9, 9);
    for (const { relativeResidual } of state.balances) expect(Math.abs(relativeResidual)).toBeLessThan(1e-9);
  });

  it('a component that no reaction mentions is inert', async () => {
    const state = await compute(
      bare({ A: 1, Q: 0.5 }, [{ species: 'A2', phase: 'aq', stoich: { A: 2 }, logK: 0 }]),
    );
    expect(molarity(state, 'Q')).toBeCloseTo(0.5, 12);
    // 2 x² + x = 1
    expect(molarity(state, 'A')).toBeCloseTo(0.5, 9);
  });
});

describe('what can not be computed is refused by name', () => {
  const reaction = { species: 'AB', phase: 'aq', stoich: { A: 1, B: 1 }, logK: 2 };
  it.each<[string, object, string[]]>([
    ['nothing at all', {}, ['#/amounts']],
    ['no amounts', { amounts: {} }, ['#/amounts']],
    ['amounts in a list', { amounts: [1] }, ['#/amounts']],
    ['a negative amount', { amounts: { 'Cu+2': -0.1, 'Zn+2': 0.1 } }, ['#/amounts/Cu+2']],
    ['an absurd amount', { amounts: { 'Cu+2': 1e9 } }, ['#/amounts/Cu+2']],
    ['an absurd lack of protons', { amounts: { 'H+': -1e6 } }, ['#/amounts/H+']],
    ['an amount in words', { amounts: { 'Cu+2': 'much' } }, ['#/amounts/Cu+2']],
    ['components nobody knows', { amounts: { 'Xx+2': 1, 'a/b': 1 } }, ['#/amounts/Xx+2', '#/amounts/a~1b']],
    ['a volume of nothing', { amounts: { 'Cu+2': 1 }, volumeL: 0 }, ['#/volumeL']],
    ['a negative volume', { amounts: { 'Cu+2': 1 }, volumeL: -1 }, ['#/volumeL']],
    ['an absurd volume', { amounts: { 'Cu+2': 1 }, volumeL: 1e12 }, ['#/volumeL']],
    ['boiling water', { amounts: { 'Cu+2': 1 }, temperatureC: 100 }, ['#/temperatureC']],
    ['an activity model nobody knows', { amounts: { 'Cu+2': 1 }, activity: 'best' }, ['#/activity']],
    ['an absurd pH', { amounts: { 'Cu+2': 1 }, pH: 40 }, ['#/pH']],
    ['a field nobody knows', { amounts: { 'Cu+2': 1 }, colour: 'blue' }, ['#/colour']],
    ['a word for the reactions', { amounts: { A: 1 }, reactions: 'all' }, ['#/reactions']],
    [
      'an absurd constant',
      { amounts: { A: 1, B: 1 }, reactions: [{ ...reaction, logK: 1e4 }] },
      ['#/reactions/0/logK'],
    ],
    [
      'a phase nobody knows',
      { amounts: { A: 1 }, reactions: [{ ...reaction, phase: 'plasma' }] },
      ['#/reactions/0/phase'],
    ],
    [
      'a species of nothing',
      { amounts: { A: 1 }, reactions: [{ ...reaction, stoich: { A: 0 } }] },
      ['#/reactions/0/stoich'],
    ],
    [
      'a species formed twice',
      { amounts: { A: 1, B: 1 }, reactions: [reaction, reaction] },
      ['#/reactions/1/species'],
    ],
    [
      'a species that is a component',
      { amounts: { A: 1, AB: 1 }, reactions: [reaction] },
      ['#/reactions/0/species'],
    ],
    [
      '401 reactions',
      {
        amounts: { A: 1, B: 1 },
        reactions: Array.from({ length: 401 }, (_, index) => ({ ...reaction, species: `S${index}` })),
      },
      ['#/reactions'],
    ],
    [
      '61 components',
      {
        amounts: Object.fromEntries(Array.from({ length: 61 }, (_, index) => [`X${index}`, 1])),
        reactions: [reaction],
      },
      ['#/amounts'],
    ],
    [
      'a headspace of no kind',
      { amounts: { 'Cu+2': 1 }, headspace: { kind: 'loose' } },
      ['#/headspace/kind'],
    ],
    [
      'a negative headspace',
      { amounts: { 'Cu+2': 1 }, headspace: { kind: 'sealed', volumeL: -1 } },
      ['#/headspace/volumeL'],
    ],
    [
      'an open gas nothing forms',
      { amounts: { 'Cu+2': 1 }, headspace: { kind: 'open', partialPressuresBar: { Xx: 1 } } },
      ['#/headspace/partialPressuresBar/Xx'],
    ],
    [
      'several faults at once',
      { amounts: { 'Cu+2': -1 }, volumeL: -1, pH: '7' },
      ['#/amounts/Cu+2', '#/pH', '#/volumeL'],
    ],
  ])('%s', async (_name, body, pointers) => {
    expect(pointersOf(await person.post(PATH, body))).toEqual(pointers);
  });

  it.each(['NaN', 'Infinity', '-Infinity'])('%s is no amount', async (word) => {
    const response: Response = await person
      .post(PATH)
      .set('content-type', 'application/json')
      .send(`{"amounts": {"Cu+2": ${word}}}`);
    expect(pointersOf(response)).toEqual(['#/amounts/Cu+2']);
  });

  it('a body that is huge, no JSON or of another type', async () => {
    problemOf(await person.post(PATH, { amounts: { ['x'.repeat(400_000)]: 1 } }), 413, 'too-large');
    problemOf(
      await person.post(PATH).set('content-type', 'application/json').send('{"amounts"'),
      400,
      'malformed',
    );
    problemOf(
      await person.post(PATH).set('content-type', 'text/plain').send('copper'),
      415,
      'unsupported-type',
    );
  });

  it('somebody who is not signed in', async () => {
    problemOf(await nobody.post(PATH, { amounts: { 'Cu+2': 1 } }), 401, 'not-signed-in');
  });
});
