import { phFamily, strengthFamily, totalFamily, volumeFamily } from '@/lib/chemistry/family';
import type { MixtureFamily } from '@/lib/chemistry/family';
import { pourMix } from '@/lib/chemistry/mixing';
import { sensitivities } from '@/lib/chemistry/sensitivity';
import { solveFor } from '@/lib/chemistry/solve-for';
import { sweep } from '@/lib/chemistry/sweep';
import type { EquilibriumState, MixInput } from '@/lib/chemistry/types';
import { complex, litre, molarity, solidMoles, solved, WATER } from './kit';

const COPPER_SULFATE = '7758-99-8';
const AMMONIA = '1336-21-6';
const SILVER_NITRATE = '7761-88-8';
const SODIUM_BROMIDE = '7647-15-6';
const SODIUM_THIOSULFATE = '10102-17-7';

function copperWithAmmonia(ammoniaMl: number): MixInput {
  return {
    portions: [
      { label: 'copper(II) sulfate', solutes: [{ substance: COPPER_SULFATE, molarity: 0.05 }], volumeMl: 50 },
      { label: 'ammonia', solutes: [{ substance: AMMONIA, molarity: 2 }], volumeMl: ammoniaMl },
    ],
    activity: 'davies',
    temperatureC: 25,
  };
}

function end(mix: MixInput): EquilibriumState {
  const outcome = pourMix(mix);
  if (!outcome.converged) throw new Error(outcome.message);
  return outcome.equilibrium;
}

describe('solveFor', () => {
  it('finds the ammonia that just redissolves the hydroxide first formed, as forward runs confirm', () => {
    const answer = solveFor(volumeFamily(copperWithAmmonia(1), 1), {
      quantity: { kind: 'solid', solid: 'Cu(OH)2(s)' },
      condition: 'gone',
      target: 0,
      from: 0,
      to: 100,
    });
    if (answer.status !== 'found') throw new Error(answer.status);
    expect(solidMoles(end(copperWithAmmonia(answer.x * (1 - 1e-6))), 'Cu(OH)2(s)')).toBeGreaterThan(0);
    expect(solidMoles(end(copperWithAmmonia(answer.x * (1 + 1e-6))), 'Cu(OH)2(s)')).toBe(0);
    expect(solidMoles(end(copperWithAmmonia(1)), 'Cu(OH)2(s)')).toBeGreaterThan(1e-4);
  });

  it('finds the thiosulfate that dissolves 0.1 g of silver bromide in 100 mL, as forward runs confirm', () => {
    const mol = 0.1 / 187.77;
    const mix = (volumeMl: number): MixInput => ({
      portions: [
        { label: 'silver', solutes: [{ substance: SILVER_NITRATE, molarity: mol / 0.05 }], volumeMl: 50 },
        { label: 'bromide', solutes: [{ substance: SODIUM_BROMIDE, molarity: mol / 0.05 }], volumeMl: 50 },
        { label: 'thiosulfate', solutes: [{ substance: SODIUM_THIOSULFATE, molarity: 0.1 }], volumeMl },
      ],
      activity: 'davies',
      temperatureC: 25,
    });
    const answer = solveFor(volumeFamily(mix(1), 2), {
      quantity: { kind: 'solid', solid: 'AgBr(s)' },
      condition: 'gone',
      target: 0,
      from: 0,
      to: 100,
    });
    if (answer.status !== 'found') throw new Error(answer.status);
    expect(solidMoles(end(mix(answer.x * (1 - 1e-6))), 'AgBr(s)')).toBeGreaterThan(0);
    expect(solidMoles(end(mix(answer.x * (1 + 1e-6))), 'AgBr(s)')).toBe(0);
    expect(answer.x * 1e-4).toBeGreaterThan(2 * mol);
  });

  it('finds the pH at which zinc hydroxide is least soluble, with more dissolved on both sides', () => {
    const input = litre({ amounts: { 'Zn+2': 0.01, 'NO3-': 0.02 }, activity: 'davies', pH: 7 });
    const quantity = { kind: 'dissolved', component: 'Zn+2' } as const;
    const answer = solveFor(phFamily(input), { quantity, condition: 'least', target: 0, from: 6, to: 14 });
    if (answer.status !== 'found') throw new Error(answer.status);
    const dissolved = (pH: number) => 0.01 - solidMoles(solved({ ...input, pH }), 'Zn(OH)2(s)');
    for (const away of [0.05, 0.5, 1.5]) {
      expect(dissolved(answer.x - away)).toBeGreaterThan(answer.value);
      expect(dissolved(answer.x + away)).toBeGreaterThan(answer.value);
    }
    expect(dissolved(answer.x) / answer.value).toBeCloseTo(1, 6);
  });

  it('finds the ligand that binds half of a 1:1 metal: half the metal and 1/K', () => {
    const family = totalFamily(
      litre({ amounts: { M: 0.01, L: 0 }, reactions: [complex('ML', { M: 1, L: 1 }, 1e4)] }),
      'L',
    );
    const answer = solveFor(family, {
      quantity: { kind: 'share', component: 'M', species: 'ML' },
      condition: 'at-least',
      target: 0.5,
      from: 0,
      to: 0.1,
    });
    expect(answer).toMatchObject({ status: 'found' });
    expect(answer.status === 'found' ? answer.x : NaN).toBeCloseTo(0.005 + 1e-4, 10);
  });

  it('gives the start where the condition holds there already', () => {
    const family = totalFamily(
      litre({ amounts: { M: 0.01, L: 0 }, reactions: [complex('ML', { M: 1, L: 1 }, 1e4)] }),
      'L',
    );
    const answer = solveFor(family, {
      quantity: { kind: 'molarity', species: 'M' },
      condition: 'at-most',
      target: 1,
      from: 0,
      to: 0.1,
    });
    expect(answer).toMatchObject({ status: 'found', x: 0 });
  });

  it('says what is nearest where the condition can not be reached', () => {
    const family = volumeFamily(copperWithAmmonia(1), 1);
    const answer = solveFor(family, {
      quantity: { kind: 'pH' },
      condition: 'at-least',
      target: 13,
      from: 0,
      to: 50,
    });
    expect(answer).toMatchObject({ status: 'not-reachable', nearestX: 50 });
    expect(answer.status === 'not-reachable' ? answer.nearestValue : NaN).toBeCloseTo(
      end(copperWithAmmonia(50)).pH ?? NaN,
      9,
    );
  });

  it.each([
    [1, 1],
    [2, 1],
    [NaN, 1],
    [0, Infinity],
  ])('refuses the range from %d to %d', (from, to) => {
    expect(() =>
      solveFor(volumeFamily(copperWithAmmonia(1), 1), {
        quantity: { kind: 'pH' },
        condition: 'at-least',
        target: 7,
        from,
        to,
      }),
    ).toThrow(RangeError);
  });
});

describe('sweep', () => {
  it('gives at every point what a run of its own gives', () => {
    const { x, pH, species, solids, failedAt } = sweep(volumeFamily(copperWithAmmonia(1), 1), {
      from: 0,
      to: 100,
      points: 51,
    });
    expect(failedAt).toEqual([]);
    for (const index of [1, 7, 25, 50]) {
      const alone = end(copperWithAmmonia(x[index] ?? NaN));
      expect(pH[index]).toBeCloseTo(alone.pH ?? NaN, 9);
      for (const id of ['Cu+2', 'Cu(NH3)4+2', 'NH4+']) {
        expect(
          (species.find((each) => each.id === id)?.molarity[index] ?? NaN) / molarity(alone, id),
        ).toBeCloseTo(1, 8);
      }
      expect(solids.find(({ id }) => id === 'Cu(OH)2(s)')?.moles[index]).toBeCloseTo(
        solidMoles(alone, 'Cu(OH)2(s)'),
        12,
      );
    }
  });

  it('locates the equivalence of a strong acid and base at equal amounts, to a millionth', () => {
    const input = litre({ volumeL: 0.05, amounts: { 'H+': 0, 'Cl-': 0.0025 }, reactions: [WATER] });
    const family: MixtureFamily = {
      ...totalFamily(input, 'Na+'),
      at: (mol) => ({ volumeL: 0.05, amounts: { 'H+': 0.0025 - mol, 'Na+': mol, 'Cl-': 0.0025 }, pH: null }),
    };
    const { events } = sweep(family, { from: 0.0001, to: 0.0049, points: 200 });
    expect(events).toEqual([expect.objectContaining({ kind: 'equivalence' })]);
    const [event] = events;
    expect(Math.abs((event?.x ?? NaN) / 0.0025 - 1)).toBeLessThan(1e-6);
    expect(event?.kind === 'equivalence' ? event.pH : NaN).toBeCloseTo(7, 1);
  });

  it('locates first and last solid and a limit where single runs change over', () => {
    const limit = { label: 'pH 10', quantity: { kind: 'pH' } as const, value: 10 };
    const { events } = sweep(volumeFamily(copperWithAmmonia(1), 1), {
      from: 0,
      to: 100,
      points: 200,
      limits: [limit],
    });
    const at = (kind: string) => events.find((event) => event.kind === kind)?.x ?? NaN;
    expect(solidMoles(end(copperWithAmmonia(at('solid-appears') * (1 - 1e-5))), 'Cu(OH)2(s)')).toBe(0);
    expect(
      solidMoles(end(copperWithAmmonia(at('solid-appears') * (1 + 1e-5))), 'Cu(OH)2(s)'),
    ).toBeGreaterThan(0);
    expect(solidMoles(end(copperWithAmmonia(at('solid-gone') * (1 - 1e-5))), 'Cu(OH)2(s)')).toBeGreaterThan(
      0,
    );
    expect(solidMoles(end(copperWithAmmonia(at('solid-gone') * (1 + 1e-5))), 'Cu(OH)2(s)')).toBe(0);
    expect(end(copperWithAmmonia(at('limit'))).pH).toBeCloseTo(10, 6);
    expect(events.filter(({ kind }) => kind === 'colour').length).toBeGreaterThan(0);
    expect(events.map(({ x }) => x)).toEqual(events.map(({ x }) => x).sort((a, b) => a - b));
  });

  it.each([0, 1, 2.5, NaN])('refuses %d points', (points) => {
    expect(() => sweep(volumeFamily(copperWithAmmonia(1), 1), { from: 0, to: 1, points })).toThrow(
      RangeError,
    );
  });

  it('refuses a portion or solute that is not there', () => {
    expect(() => volumeFamily(copperWithAmmonia(1), 2)).toThrow(RangeError);
    expect(() => strengthFamily(copperWithAmmonia(1), 1, 1)).toThrow(RangeError);
  });
});

describe('sensitivities', () => {
  const mix = copperWithAmmonia(30);
  const all = sensitivities(mix);
  const list = 'converged' in all ? [] : all;
  const watched = ['Cu+2', 'NH3', 'Cu(NH3)4+2', 'OH-'];
  const STEP = 1e-4;

  /** d ln molarity by central difference of whole runs. */
  function byDifference(at: (times: number) => EquilibriumState, id: string): number {
    return (Math.log(molarity(at(1 + STEP), id)) - Math.log(molarity(at(1 - STEP), id))) / (2 * STEP);
  }

  it('of a volume are those of runs with a little more and less', () => {
    const ammonia = list.find(({ input }) => input.kind === 'volume' && input.portion === 'ammonia');
    for (const id of watched) {
      expect(ammonia?.lnMolarity[id]).toBeCloseTo(
        byDifference((times) => end(copperWithAmmonia(30 * times)), id),
        6,
      );
    }
  });

  it('of a strength are those of runs with a little more and less', () => {
    const copper = list.find(({ input }) => input.kind === 'strength' && input.substance === COPPER_SULFATE);
    const withCopper = (times: number) => {
      const [first, ...rest] = mix.portions;
      if (!first) throw new Error('There are portions');
      return end({
        ...mix,
        portions: [{ ...first, solutes: [{ substance: COPPER_SULFATE, molarity: 0.05 * times }] }, ...rest],
      });
    };
    for (const id of watched) expect(copper?.lnMolarity[id]).toBeCloseTo(byDifference(withCopper, id), 6);
    const pH = ((withCopper(1 + STEP).pH ?? NaN) - (withCopper(1 - STEP).pH ?? NaN)) / (2 * STEP);
    expect(copper?.pH).toBeCloseTo(pH, 6);
  });

  it('of all volumes add up to nothing, since scaling them changes no concentration', () => {
    const volumes = list.filter(({ input }) => input.kind === 'volume');
    expect(volumes.length).toBe(2);
    for (const id of watched)
      expect(volumes.reduce((sum, { lnMolarity }) => sum + (lnMolarity[id] ?? NaN), 0)).toBeCloseTo(0, 9);
  });

  it('of a constant name the species it makes', () => {
    const tetraammine = list.find(({ input }) => input.kind === 'constant' && input.species === 'Cu(NH3)4+2');
    expect(tetraammine?.lnMolarity['Cu(NH3)4+2']).toBeGreaterThan(0);
    expect(tetraammine?.lnMolarity['NH3']).toBeLessThan(0);
  });
});

describe('a family', () => {
  it('takes components in and out along the way', () => {
    const { x, species } = sweep(strengthFamily(copperWithAmmonia(10), 1, 0), { from: 0, to: 1, points: 3 });
    const ammonia = species.find(({ id }) => id === 'NH3')?.molarity ?? [];
    expect(x).toEqual([0, 0.5, 1]);
    expect(ammonia[0]).toBe(0);
    expect(ammonia[2]).toBeGreaterThan(ammonia[1] ?? NaN);
  });
});
