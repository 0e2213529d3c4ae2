import { activityLaw } from './activity';
import { gasId } from './reaction-system';
import type { ReactionSystem } from './reaction-system';
import type { EquilibriumProblem } from './solver/problem';
import { GAS_CONSTANT, KELVIN_AT_0C } from './temperature';
import type { SpeciationInput } from './types';

const LN10 = Math.LN10;
const PASCAL_PER_BAR = 1e5;
const LITRES_PER_M3 = 1000;

/** What may change while the reactions, the temperature and the vessel stay. */
export type MixturePoint = Pick<SpeciationInput, 'volumeL' | 'amounts' | 'pH'>;

interface Column {
  readonly stoich: Readonly<Record<string, number>>;
  /** ln K, with the held pressure of an open gas and the mol per bar of a sealed one in it. */
  readonly lnK: number;
}

/** A reaction system as numbers, whose point can be moved. */
export interface SystemProblem {
  readonly problem: EquilibriumProblem;
  /** Columns whose amount goes with the volume: all dissolved ones. */
  readonly dissolvedCount: number;
  /** @throws RangeError where the point holds the pH and the system does not, or the other way round */
  moveTo(point: MixturePoint): void;
}

function gasColumns(
  system: ReactionSystem,
  { headspace, temperatureC }: SpeciationInput,
): { readonly sealed: Column[]; readonly open: Column[] } {
  if (headspace.kind === 'none') return { sealed: [], open: [] };
  if (headspace.kind === 'sealed') {
    const molPerBar =
      (PASCAL_PER_BAR * (headspace.volumeL / LITRES_PER_M3)) / (GAS_CONSTANT * (temperatureC + KELVIN_AT_0C));
    return {
      sealed: system.gases.map(({ stoich, logK }) => ({ stoich, lnK: logK * LN10 + Math.log(molPerBar) })),
      open: [],
    };
  }
  const open = Object.entries(headspace.partialPressuresBar).flatMap(([name, bar]) => {
    const gas = system.gases.find(({ species }) => species === gasId(name));
    return gas ? [{ stoich: gas.stoich, lnK: gas.logK * LN10 - Math.log(bar) }] : [];
  });
  return { sealed: [], open };
}

/** Columns in the order of problem.ts: components, aqueous, sealed gases; solids, open gases, held H+. */
export function systemProblem(system: ReactionSystem, input: SpeciationInput): SystemProblem {
  const { components, aqueous, solids } = system;
  const n = components.length;
  const holdsPh = input.pH !== null && components.some(({ id }) => id === 'H+');
  const { sealed, open } = gasColumns(system, input);
  const formed = ({
    stoich,
    logK,
  }: {
    readonly stoich: Column['stoich'];
    readonly logK: number;
  }): Column => ({ stoich, lnK: logK * LN10 });
  const dissolved = [
    ...components.map(({ id }): Column => ({ stoich: { [id]: 1 }, lnK: 0 })),
    ...aqueous.map(formed),
  ];
  const columns = [
    ...dissolved,
    ...sealed,
    ...solids.map(formed),
    ...open,
    ...(holdsPh ? [{ stoich: { 'H+': 1 }, lnK: 0 }] : []),
  ];
  const soluteCount = dissolved.length + sealed.length;

  const rowOf = new Map(components.map(({ id }, row) => [id, row]));
  const stoich = new Float64Array(columns.length * n);
  columns.forEach((column, index) => {
    for (const [id, coefficient] of Object.entries(column.stoich)) {
      const row = rowOf.get(id);
      if (row !== undefined) stoich[index * n + row] = coefficient;
    }
  });
  const lnK = new Float64Array(columns.length);
  const totals = new Float64Array(n);
  const activity = activityLaw(input.activity, [...components, ...aqueous], soluteCount, input.temperatureC);
  const problem: EquilibriumProblem = {
    componentCount: n,
    soluteCount,
    phaseCount: columns.length - soluteCount,
    stoich,
    lnK,
    totals,
    isReservoir: columns.slice(soluteCount).map((_, phase) => phase >= solids.length),
    activity,
  };
  const moveTo = ({ volumeL, amounts, pH }: MixturePoint) => {
    if ((pH !== null) !== (input.pH !== null))
      throw new RangeError('A system holds the pH everywhere or nowhere');
    const lnVolume = Math.log(volumeL);
    columns.forEach((column, index) => {
      lnK[index] = column.lnK + (index < dissolved.length ? lnVolume : 0);
    });
    if (holdsPh) lnK[columns.length - 1] = (pH ?? 0) * LN10;
    components.forEach(({ id }, row) => {
      totals[row] = id === 'H+' && holdsPh ? 0 : (amounts[id] ?? 0);
    });
    activity?.setVolume(volumeL);
  };
  moveTo(input);
  return { problem, dissolvedCount: dissolved.length, moveTo };
}
