import type { Mix } from '../chemistry/types';
import { figure } from './figures';
import { estimateGas } from './gas';
import { findGas, GASES } from './tables';
import type { Finding, Room } from './types';

/** Gases of which little is too much: told as soon as the air above the liquid comes to the order of a short-term limit. */
const TOLD_EARLY = new Set(['HCN', 'H2S']);
const ORDER_OF_LIMIT = 0.2;
/** Component by which the dissolved gas is counted, its whole amount being the worst case. */
const COMPONENT: Readonly<Record<string, string>> = { HCN: 'CN-', H2S: 'HS-', SO2: 'SO3-2', NH3: 'NH3' };

/**
 * Gas that stands just above the liquid of its own accord, by Henry's law at the computed composition. Its
 * pressure there can pass a limit although hardly any is in the room: a reason to cover, never a reason to clear.
 */
export function vapourFindings(mix: Mix, room: Room): Finding[] {
  const { equilibrium, finalVolumeMl, steps } = mix;
  const concerns = steps.map(({ afterPortion }) => afterPortion);
  return GASES.flatMap(({ id, name }) => {
    const component = COMPONENT[id];
    if (!component) return [];
    const total = equilibrium.balances.find((balance) => balance.component === component)?.total ?? 0;
    const gas = total > 0 ? estimateGas(id, total, finalVolumeMl, equilibrium, room) : null;
    const limit = findGas(id)?.limits.find(({ kind }) => kind === 'short-term')?.ppm;
    const gravely = findGas(id)?.limits.find(({ kind }) => kind === 'idlh')?.ppm ?? Infinity;
    if (
      !gas ||
      gas.ppmAboveLiquid === null ||
      limit === undefined ||
      gas.ppmAboveLiquid < limit * (TOLD_EARLY.has(id) ? ORDER_OF_LIMIT : 1)
    )
      return [];
    return [
      {
        rule: `vapour:${id}`,
        severity:
          gas.ppmAboveLiquid > gravely || TOLD_EARLY.has(id) ? ('caution' as const) : ('note' as const),
        scope: 'mix' as const,
        title: `${name.charAt(0).toUpperCase()}${name.slice(1)} above the open liquid`,
        reason: `At equilibrium the air just above the liquid holds about ${figure(gas.ppmAboveLiquid)} ppm of ${name}, against ${limit} ppm for a short stay.`,
        mustNot: 'Do not smell at the vessel or leave it open.',
        gas,
        precautions: ['Keep the vessel covered', 'Work where the air is drawn away from the face'],
        alternative: null,
        source: findGas(id)?.henrySource ?? 'Henry constant of the equilibrium model',
        concerns,
      },
    ];
  });
}
