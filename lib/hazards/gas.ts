import type { EquilibriumState } from '../chemistry/types';
import type { ScreenedSolute } from './contents';
import { findGas, GROUPS } from './tables';
import type { Gas, GasStoichiometry } from './tables';
import type { GasEstimate, GasLimit, Room } from './types';

/** m³ of gas per mol at 25 °C and 1 atm. */
const MOLAR_VOLUME_M3 = 0.0244654;
/** What stands before a face at the bench. */
export const BREATHING_ZONE_M3 = 0.1;
const BAR_PER_ATM = 1.01325;

/** ppm by volume of an amount of gas in so much air. */
export function ppmIn(volumeM3: number, mol: number): number {
  return (mol * MOLAR_VOLUME_M3 * 1e6) / volumeM3;
}

/** mol of what a reactant stands for among the solutes. */
function availableMol(reactant: string, solutes: readonly ScreenedSolute[]): number | null {
  if (reactant === 'H+') {
    const acids = solutes.filter(({ groups }) => !groups.has('ammonia_or_ammonium'));
    return positiveOrUnknown(
      acids.reduce(
        (sum, { substance, amountMol }) => sum + Math.max(0, substance.releases?.['H+'] ?? 0) * amountMol,
        0,
      ),
    );
  }
  if (reactant === 'OH-') {
    return solutes.reduce(
      (sum, { substance, amountMol }) => sum + Math.max(0, -(substance.releases?.['H+'] ?? 0)) * amountMol,
      0,
    );
  }
  const released = solutes.reduce(
    (sum, { substance, amountMol }) => sum + (substance.releases?.[component(reactant)] ?? 0) * amountMol,
    0,
  );
  if (released > 0) return released / (reactant === 'Cr2O7-2' ? 2 : 1);
  const groups = GROUPS.filter(({ limiting }) => limiting.includes(reactant)).map(({ id }) => id);
  const grouped = solutes
    .filter((solute) => groups.some((id) => solute.groups.has(id)))
    .reduce((sum, { amountMol }) => sum + amountMol, 0);
  return grouped > 0 ? grouped : null;
}

/** Where nobody is an acid by name, its amount is not known: hydrolysing metals have no fixed count. */
function positiveOrUnknown(mol: number): number | null {
  return mol > 0 ? mol : null;
}

/** The master component a reactant is counted by. */
function component(reactant: string): string {
  return { 'NH4+': 'NH3', 'Cr2O7-2': 'CrO4-2', HNO3: 'NO3-', HCl: 'Cl-', HNO2: 'NO2-' }[reactant] ?? reactant;
}

/**
 * The most gas the amounts present can give by the stoichiometry: the scarcest known reactant decides.
 * @returns mol by gas id, nothing where no reactant can be counted
 */
export function worstCase(
  stoichiometry: GasStoichiometry,
  solutes: readonly ScreenedSolute[],
): Readonly<Record<string, number>> {
  const { consumes, limiting, gives } = stoichiometry;
  const limitingCount = consumes[limiting] ?? 1;
  let extent = Infinity;
  for (const [reactant, count] of Object.entries(consumes)) {
    const mol = availableMol(reactant, solutes);
    if (mol !== null) extent = Math.min(extent, mol / count);
  }
  if (!Number.isFinite(extent) || extent <= 0) return {};
  return Object.fromEntries(
    Object.entries(gives).map(([gas, perLimiting]) => [gas, perLimiting * limitingCount * extent]),
  );
}

/** Named limits, the lowest short-term one first. */
function limitsOf(gas: Gas): { readonly strictest: GasLimit | null; readonly limits: readonly GasLimit[] } {
  const sorted = [...gas.limits].sort((a, b) => a.ppm - b.ppm);
  const shortTerm = sorted.find(({ kind }) => kind === 'short-term') ?? sorted[0] ?? null;
  const plain = ({ name, ppm, source }: GasLimit): GasLimit => ({ name, ppm, source });
  return { strictest: shortTerm ? plain(shortTerm) : null, limits: sorted.map(plain) };
}

/**
 * Worst case and prediction for one gas.
 *
 * The prediction shares the dissolved gas between the liquid and a closed 0.1 m³ of air at the final pH:
 * C(air) = n / (V(air) + K·V(liquid)/α), with K the Henry constant (aqueous over gas) and α the share of the
 * neutral form. It informs and may raise a severity; it never lowers one, since much air over little liquid
 * takes up most of a weakly held gas even where little of it is free.
 *
 * @param mol - worst case, mol
 * @param liquidMl - volume of the liquid
 * @param state - equilibrium of the mix; null where it is not known
 */
export function estimateGas(
  gasId: string,
  mol: number,
  liquidMl: number,
  state: EquilibriumState | null,
  room: Room,
): GasEstimate | null {
  const gas = findGas(gasId);
  if (!gas) return null;
  const { strictest, limits } = limitsOf(gas);
  const bar = state?.gases.find(({ id }) => id === `${gasId}(g)`)?.partialPressureBar ?? null;
  return {
    species: gasId,
    worstCaseMoles: mol,
    mlAt25C: mol * MOLAR_VOLUME_M3 * 1e6,
    ppmInRoom: ppmIn(room.volumeM3, mol),
    ppmInBreathingZone: ppmIn(BREATHING_ZONE_M3, mol),
    predictedPpmInBreathingZone: predictedPpm(gas, mol, liquidMl, state?.pH ?? null),
    ppmAboveLiquid: bar === null ? null : (bar / BAR_PER_ATM) * 1e6,
    limit: strictest,
    limits,
  };
}

/** Bases hold their gas in acid, acids theirs in alkali. */
const BASIC_GASES = new Set(['NH3']);

export function predictedPpm(gas: Gas, mol: number, liquidMl: number, pH: number | null): number | null {
  if (gas.aqueousOverGas === null) return null;
  if (gas.pKa !== null && pH === null) return null;
  const away =
    gas.pKa === null || pH === null ? -Infinity : BASIC_GASES.has(gas.id) ? gas.pKa - pH : pH - gas.pKa;
  const neutralShare = 1 / (1 + 10 ** away);
  const liquidM3 = liquidMl * 1e-6;
  const molPerM3 = mol / (BREATHING_ZONE_M3 + (gas.aqueousOverGas * liquidM3) / neutralShare);
  return ppmIn(1, molPerM3);
}
