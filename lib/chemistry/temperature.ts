import temperatureData from './data/temperature.json';

export const KELVIN_AT_0C = 273.15;
/** Molar gas constant, J/(mol K): exact since the SI of 2019 (CODATA 2018). */
export const GAS_CONSTANT = 8.314462618;
const REFERENCE_K = 298.15;
const LN10 = Math.LN10;

interface Point {
  readonly at: number;
  readonly value: number;
}

function tableOf(values: Readonly<Record<string, number>>): readonly Point[] {
  return Object.entries(values)
    .map(([at, value]) => ({ at: Number(at), value }))
    .sort((a, b) => a.at - b.at);
}

/** Cubic through the four nearest points; the tables are smooth and closely spaced. */
function interpolate(table: readonly Point[], at: number): number {
  const above = table.findIndex((point) => point.at >= at);
  const middle = above < 0 ? table.length : above;
  const first = Math.min(Math.max(0, middle - 2), table.length - 4);
  const near = table.slice(first, first + 4);
  return near.reduce((sum, point) => {
    const weight = near.reduce(
      (product, other) => (other === point ? product : (product * (at - other.at)) / (point.at - other.at)),
      1,
    );
    return sum + weight * point.value;
  }, 0);
}

const PKW = tableOf(temperatureData.pKw.values);
const DEBYE_A = tableOf(temperatureData.debye_huckel.A);
const DEBYE_B = tableOf(temperatureData.debye_huckel.B_per_angstrom);

/** How much log Kw moves from 25 °C, by the table (Lange's Handbook, Table 8.5). */
export function logKwShift(temperatureC: number): number {
  return -(interpolate(PKW, temperatureC) - interpolate(PKW, 25));
}

/** Debye–Hückel A of log10 γ, (L/mol)^½, and B in 1/(Å·(mol/L)^½). */
export function debyeHuckel(temperatureC: number): { readonly a: number; readonly b: number } {
  return {
    a: temperatureC === 25 ? 0.509 : interpolate(DEBYE_A, temperatureC),
    b: interpolate(DEBYE_B, temperatureC),
  };
}

/** van 't Hoff: log K at a temperature from its value at 25 °C and the enthalpy, taken as constant over 10–40 °C. */
export function vantHoff(logK: number, enthalpyKJ: number, temperatureC: number): number {
  const kelvin = temperatureC + KELVIN_AT_0C;
  return logK - ((enthalpyKJ * 1000) / (LN10 * GAS_CONSTANT)) * (1 / kelvin - 1 / REFERENCE_K);
}
