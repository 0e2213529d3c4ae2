/**
 * Closed-cup flash points of solvents in water, °C by % by mass, rounded to the low side. Ethanol from two stored
 * copies of a published table, the others from memory.
 */
const FLASH_POINTS: Readonly<Record<string, readonly (readonly [percent: number, celsius: number])[]>> = {
  ethanol: [
    [4, 62],
    [8.05, 49],
    [16.2, 36],
    [24.6, 29],
    [33.3, 26],
    [42.4, 24],
    [52.1, 22],
    [62.4, 21],
    [73.5, 20],
    [85.7, 17],
    [100, 13],
  ],
  methanol: [
    [5, 64],
    [10, 54],
    [20, 44],
    [30, 36],
    [40, 30],
    [50, 26],
    [60, 22.5],
    [80, 17],
    [100, 11],
  ],
  'propan-2-ol': [
    [2.5, 64],
    [5, 50],
    [10, 40],
    [20, 29],
    [30, 25],
    [40, 23.5],
    [50, 22],
    [80, 17],
    [100, 12],
  ],
  acetone: [
    [2, 62],
    [4, 54],
    [10, 27],
    [15, 18],
    [20, 10],
    [50, -9],
    [100, -18],
  ],
};
/** Flammable liquids without a table count as easily ignited from here. */
const UNTABULATED: Readonly<Record<string, number>> = {
  'ethyl-acetate': -4,
  hexane: -22,
  toluene: 4,
  ethylenediamine: 34,
};
const UNTABULATED_FROM_PERCENT = 3;

/** The flash point of one solvent in water; null where nothing in it burns at these strengths. */
export function flashPointOf(
  solutes: readonly { readonly id: string; readonly percent: number }[],
): number | null {
  const points = solutes.flatMap(({ id, percent }) => {
    const table = FLASH_POINTS[id];
    if (table) return interpolate(table, percent) ?? [];
    const own = UNTABULATED[id];
    return own !== undefined && percent >= UNTABULATED_FROM_PERCENT ? [own] : [];
  });
  return points.length === 0 ? null : Math.min(...points);
}

function interpolate(table: readonly (readonly [number, number])[], percent: number): number | null {
  const above = table.findIndex(([at]) => at >= percent);
  if (above === 0) return null;
  const [x1, y1] = table[above < 0 ? table.length - 1 : above] ?? [0, 0];
  const [x0, y0] = table[above < 0 ? table.length - 2 : above - 1] ?? [0, 0];
  return y0 + ((y1 - y0) * (percent - x0)) / (x1 - x0);
}
