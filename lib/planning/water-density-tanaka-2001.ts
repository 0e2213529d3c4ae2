/** Range in which the formula was fitted, °C. */
export const WATER_DENSITY_RANGE_C = { low: 0, high: 40 } as const;

/**
 * Density of air-free water at 101 325 Pa, g/mL:
 * ρ = a5 (1 − (t + a1)² (t + a2) / (a3 (t + a4))).
 *
 * @param temperatureC - 0 to 40 °C
 * @throws RangeError outside that range
 * @see Tanaka, Girard, Davis, Peuto, Bignell, Metrologia 38 (2001) 301; constants from memory, checked against
 *   IAPWS-95 between 15 and 30 °C
 */
export function waterDensityGPerMl(temperatureC: number): number {
  const { low, high } = WATER_DENSITY_RANGE_C;
  if (!(temperatureC >= low && temperatureC <= high)) {
    throw new RangeError(`water density is known from ${low} to ${high} °C, not at ${temperatureC} °C`);
  }
  const t = temperatureC;
  const [a1, a2, a3, a4, a5] = [-3.983035, 301.797, 522528.9, 69.34881, 0.99997495];
  return a5 * (1 - ((t + a1) ** 2 * (t + a2)) / (a3 * (t + a4)));
}
