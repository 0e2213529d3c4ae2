import request from 'supertest';
import type { MixAnswer } from '@/lib/schemas/mixes';
import { bodyOf, nobody, pointersOf, problemOf, signIn } from '../support/api';
import type { Caller } from '../support/api';
import { serverUrl } from '../support/server';

let caller: Caller;
beforeAll(async () => {
  caller = await signIn('instructor');
});

interface Speciation {
  readonly species: readonly { readonly id: string; readonly molarity: number }[];
  readonly solids: readonly { readonly id: string; readonly moles: number }[];
}
const molarityOf = ({ species }: Speciation, id: string) =>
  species.find((one) => one.id === id)?.molarity ?? NaN;
const ideal = { activity: 'ideal' };

describe('speciation of bare systems, by the figures of hand-worked examples (drive to completion, then back: common practice)', () => {
  test('0.2 mol/L copper(II) with 0.5 mol/L ammonia, K 1.7e13', async () => {
    const state = bodyOf<Speciation>(
      await caller.post('/api/speciation', {
        ...ideal,
        amounts: { 'Cu+2': 0.2, NH3: 0.5 },
        reactions: [
          { species: 'Cu(NH3)4+2', phase: 'aq', stoich: { 'Cu+2': 1, NH3: 4 }, logK: Math.log10(1.7e13) },
        ],
      }),
    );
    expect(molarityOf(state, 'Cu(NH3)4+2')).toBeCloseTo(0.12486, 5);
    expect(molarityOf(state, 'NH3')).toBeCloseTo(5.59e-4, 6);
    expect(molarityOf(state, 'Cu+2')).toBeCloseTo(0.07514, 5);
  });

  test('0.0288 mol/L silver with 0.0385 mol/L cyanide, K 1.0e21', async () => {
    const state = bodyOf<Speciation>(
      await caller.post('/api/speciation', {
        ...ideal,
        amounts: { 'Ag+': 0.0288, 'CN-': 0.0385 },
        reactions: [{ species: 'Ag(CN)2-', phase: 'aq', stoich: { 'Ag+': 1, 'CN-': 2 }, logK: 21 }],
      }),
    );
    expect(molarityOf(state, 'CN-') / 4.5e-11).toBeCloseTo(1, 2);
    expect(molarityOf(state, 'Ag(CN)2-')).toBeCloseTo(0.01925, 5);
  });

  test('saturated lead iodide with its complex: the physical root and no other', async () => {
    const state = bodyOf<Speciation>(
      await caller.post('/api/speciation', {
        ...ideal,
        amounts: { 'Pb+2': 1, 'I-': 2 },
        reactions: [
          { species: 'PbI2(s)', phase: 's', stoich: { 'Pb+2': 1, 'I-': 2 }, logK: -Math.log10(9.8e-9) },
          { species: 'PbI4-2', phase: 'aq', stoich: { 'Pb+2': 1, 'I-': 4 }, logK: Math.log10(3e4) },
        ],
      }),
    );
    expect(molarityOf(state, 'Pb+2')).toBeCloseTo(0.00135, 5);
    expect(molarityOf(state, 'I-')).toBeCloseTo(0.0027, 4);
    expect(molarityOf(state, 'PbI4-2') / 2.1e-9).toBeGreaterThan(0.97);
    expect(molarityOf(state, 'PbI4-2') / 2.1e-9).toBeLessThan(1.03);
    expect(Math.max(...state.species.map(({ molarity }) => molarity))).toBeLessThan(2);
  });
});

const silverAndCyanide = {
  activity: 'ideal',
  portions: [
    { label: 'A', solutes: [{ substance: '7761-88-8', molarity: 0.075 }], volumeMl: 25 },
    { label: 'B', solutes: [{ substance: '143-33-9', molarity: 0.1 }], volumeMl: 40 },
  ],
};

test('25 mL of silver nitrate with 40 mL of cyanide dilute to 0.02885 and 0.06154 mol/L, cyanide in excess', async () => {
  const mix = bodyOf<MixAnswer>(await caller.post('/api/mixes/preview', silverAndCyanide));
  expect(mix.finalVolumeMl).toBe(65);
  const [silver, cyanide] = mix.diluted;
  expect(silver?.molarity).toBeCloseTo(0.02885, 5);
  expect(cyanide?.molarity).toBeCloseTo(0.06154, 5);
  const free = (id: string) => mix.equilibrium.species.find((one) => one.id === id)?.molarity ?? 0;
  expect(free('CN-')).toBeGreaterThan(1000 * free('Ag+'));
  expect(['review', 'stop']).toContain(mix.decision);
});

test('cyanide poured into acid is a stop with the gas it gives: 1.0 mmol, about 24.5 mL at 25 °C', async () => {
  const mix = bodyOf<MixAnswer>(
    await caller.post('/api/mixes/preview', {
      portions: [
        { label: 'Cyanide', solutes: [{ substance: 'sodium-cyanide', molarity: 0.1 }], volumeMl: 10 },
        { label: 'Acid', solutes: [{ substance: 'hydrochloric-acid', molarity: 1 }], volumeMl: 10 },
      ],
    }),
  );
  expect(mix.decision).toBe('stop');
  const gas = mix.findings.find((finding) => finding.gas?.species === 'HCN')?.gas;
  expect(gas?.worstCaseMoles).toBeCloseTo(0.001, 9);
  expect(gas?.mlAt25C).toBeCloseTo(24.5, 1);
});

describe('bad input names its field', () => {
  const portion = (change: object) => ({
    portions: [{ label: 'A', solutes: [{ substance: '7761-88-8', molarity: 0.1 }], volumeMl: 25, ...change }],
  });
  test.each([
    ['a negative volume', portion({ volumeMl: -1 }), '#/portions/0/volumeMl'],
    ['an absurd volume', portion({ volumeMl: 1e9 }), '#/portions/0/volumeMl'],
    ['a volume as text', portion({ volumeMl: '25' }), '#/portions/0/volumeMl'],
    [
      'an absurd strength',
      portion({ solutes: [{ substance: '7761-88-8', molarity: 500 }] }),
      '#/portions/0/solutes/0/molarity',
    ],
    [
      'an unknown substance',
      portion({ solutes: [{ substance: 'unobtainium', molarity: 1 }] }),
      '#/portions/0/solutes/0/substance',
    ],
    ['an unknown field', portion({ colour: 'blue' }), '#/portions/0/colour'],
    ['an absurd temperature', { ...portion({}), temperatureC: 4000 }, '#/temperatureC'],
    ['no portions', { portions: [] }, '#/portions'],
  ])('mixes/preview: %s', async (_name, body, pointer) => {
    expect(pointersOf(await caller.post('/api/mixes/preview', body))).toContain(pointer);
  });

  test.each([
    ['a negative amount', { amounts: { 'Cu+2': -1 } }, '#/amounts/Cu+2'],
    ['an unknown component', { amounts: { 'Xx+2': 1 } }, '#/amounts/Xx+2'],
    ['no amounts', { amounts: {} }, '#/amounts'],
    ['an absurd volume', { amounts: { 'Cu+2': 1 }, volumeL: 0 }, '#/volumeL'],
    ['an unknown field', { amounts: { 'Cu+2': 1 }, solvent: 'ether' }, '#/solvent'],
    ['a wrong type', { amounts: { 'Cu+2': 'much' } }, '#/amounts/Cu+2'],
  ])('speciation: %s', async (_name, body, pointer) => {
    expect(pointersOf(await caller.post('/api/speciation', body))).toContain(pointer);
  });

  test('NaN in the body is named though it is no JSON', async () => {
    const response = await caller
      .post('/api/mixes/preview')
      .set('content-type', 'application/json')
      .send('{"portions":[{"label":"A","solutes":[],"volumeMl":NaN}]}');
    expect(pointersOf(response)).toEqual(['#/portions/0/volumeMl']);
  });

  test('what is no JSON at all is 400, another content type 415, a huge body 413', async () => {
    const post = () => caller.post('/api/speciation');
    problemOf(await post().set('content-type', 'application/json').send('{"amounts"'), 400, 'malformed');
    problemOf(await post().set('content-type', 'text/plain').send('hello'), 415);
    const huge = JSON.stringify({ amounts: { 'Cu+2': 1 }, suppress: Array(60_000).fill('Cu(NH3)4+2') });
    problemOf(await post().set('content-type', 'application/json').send(huge), 413);
  });

  test('totals that nothing can make up are not converged, never a wrong number', async () => {
    const response = await caller.post('/api/speciation', {
      amounts: { 'H+': -1 },
      reactions: [{ species: 'HA', phase: 'aq', stoich: { 'H+': 1, A: 1 }, logK: 4 }],
    });
    problemOf(response, 422, 'not-converged');
  });

  test('not signed in is 401', async () => {
    problemOf(await nobody.post('/api/speciation', { amounts: { 'Cu+2': 1 } }), 401);
    expect((await request(serverUrl()).get('/api/orders')).status).toBe(401);
  });
});
