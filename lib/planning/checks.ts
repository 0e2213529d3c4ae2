/** @throws RangeError unless `value` is finite and greater than zero */
export function requirePositive(value: number, what: string): void {
  if (!Number.isFinite(value) || value <= 0)
    throw new RangeError(`${what} must be a number above 0, not ${value}`);
}

/** @throws RangeError unless `value` is finite and not negative */
export function requireNotNegative(value: number, what: string): void {
  if (!Number.isFinite(value) || value < 0) throw new RangeError(`${what} must be 0 or more, not ${value}`);
}

/** @throws RangeError unless `value` is an exact integer and not negative */
export function requireWhole(value: number, what: string): void {
  if (!Number.isSafeInteger(value) || value < 0)
    throw new RangeError(`${what} must be a whole number, 0 or more, not ${value}`);
}

/** @throws RangeError unless `percent` lies above 0 and not above 100 */
export function requirePercent(percent: number, what: string): void {
  if (!(percent > 0 && percent <= 100))
    throw new RangeError(`${what} must lie above 0 and not above 100 %, not ${percent}`);
}
