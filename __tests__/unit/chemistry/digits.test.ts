import Decimal from 'decimal.js';
import { chargeOf } from '@/lib/chemistry/formula';
import type { SpeciationInput } from '@/lib/chemistry/types';
import { strainedSystem, SystemSource } from '@/scripts/bench/random-systems';
import { solveToHighPrecision } from './high-precision';
import { litre, molarity, solved } from './kit';

jest.setTimeout(120_000);

const SYSTEMS = 200;
const RELATIVE = 1e-8;
/** Below this a double has no digits left to compare. */
const LEAST = 1e-300;
/** Solids are what is left of the totals, so their error is measured against those. */
const OF_TOTAL = 1e-13;

/** Davies' equation (b = 0.3, A = 0.509), held from 1 mol/L on; 0.1 I in log γ for neutral species. */
function daviesLnGamma(charge: number, ionicStrength: number): number {
  const held = Math.min(ionicStrength, 1);
  const root = Math.sqrt(held);
  return Math.LN10 * (charge === 0 ? 0.1 * held : -0.509 * charge ** 2 * (root / (1 + root) - 0.3 * held));
}

describe('digits of the answer', () => {
  it(`agrees with a hundred-digit calculation to 1e-8 in every concentration of ${SYSTEMS} strained systems`, () => {
    const source = new SystemSource(20_261_201);
    let withSolids = 0;
    for (let count = 0; count < SYSTEMS; count += 1) {
      const input = strainedSystem(source);
      const state = solved(input);
      const exact = solveToHighPrecision(input, state);
      const largestTotal = Math.max(...Object.values(input.amounts).map(Math.abs));
      const wrong = state.species.filter(({ id, molarity: found }) => {
        const right = exact.molarity.get(id);
        if (right?.lt(LEAST)) return found > LEAST;
        return !right || right.minus(found).div(right).abs().gt(RELATIVE);
      });
      expect({ count, wrong }).toEqual({ count, wrong: [] });
      const wrongSolids = state.solids.filter(
        ({ id, moles }) => Math.abs(Number(exact.solidMoles.get(id)) - moles) > OF_TOTAL * largestTotal,
      );
      expect({ count, wrongSolids }).toEqual({ count, wrongSolids: [] });
      if (state.solids.some(({ moles }) => moles > 0)) withSolids += 1;
    }
    expect(withSolids).toBeGreaterThan(SYSTEMS / 10);
  });

  it('agrees with it just as well under Davies, at the ionic strength it reports', () => {
    const source = new SystemSource(7);
    for (let count = 0; count < 25; count += 1) {
      const input: SpeciationInput = { ...strainedSystem(source), activity: 'davies' };
      const state = solved(input);
      const strength = state.species.reduce(
        (sum, { id, molarity: c }) => sum + (c * chargeOf(id) ** 2) / 2,
        0,
      );
      expect(Math.abs(state.ionicStrength - strength)).toBeLessThanOrEqual(1e-11 * strength);
      const exact = solveToHighPrecision(
        input,
        state,
        (id) => new Decimal(daviesLnGamma(chargeOf(id), strength)),
      );
      const wrong = state.species.filter(({ id, molarity: found }) => {
        const right = exact.molarity.get(id);
        if (right?.lt(LEAST)) return found > LEAST;
        return !right || right.minus(found).div(right).abs().gt(RELATIVE);
      });
      expect({ count, wrong }).toEqual({ count, wrong: [] });
    }
  });

  it('keeps every digit of the free metal where a 1:2 complex with K = 1e40 uses up both exactly', () => {
    const state = solved(
      litre({
        amounts: { 'Ag+': 0.02, 'CN-': 0.04 },
        reactions: [{ species: 'Ag(CN)2-', phase: 'aq', stoich: { 'Ag+': 1, 'CN-': 2 }, logK: 40 }],
      }),
    );
    const closedForm = Math.cbrt(0.02 / (4 * 1e40));
    expect(closedForm).toBeCloseTo(7.937005e-15, 20);
    expect(Math.abs(molarity(state, 'Ag+') / closedForm - 1)).toBeLessThan(RELATIVE);
    expect(Math.abs(molarity(state, 'CN-') / (2 * closedForm) - 1)).toBeLessThan(RELATIVE);
  });

  it.each([-60, -30, -1, 0, 1, 30, 60])(
    'gives the root of the quadratic for a 1:1 complex with log K = %d',
    (logK) => {
      const state = solved(
        litre({
          amounts: { 'M+2': 0.03, L: 0.03 },
          reactions: [{ species: 'ML+2', phase: 'aq', stoich: { 'M+2': 1, L: 1 }, logK }],
        }),
      );
      const free = (2 * 0.03) / (1 + Math.sqrt(1 + 4 * 10 ** logK * 0.03));
      expect(Math.abs(molarity(state, 'M+2') / free - 1)).toBeLessThan(1e-12);
      expect(Math.abs(molarity(state, 'ML+2') / (10 ** logK * free * free) - 1)).toBeLessThan(1e-12);
    },
  );
});
