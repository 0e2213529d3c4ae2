/**
 * Error-free sums and products of doubles (Knuth's two-sum, Dekker's two-product), kept as a high and a
 * low part. A total such as T(L) − 2 T(M) at an exactly stoichiometric point must be exactly zero, and
 * close to it must keep every digit: the answer rests on that difference.
 */

const SPLITTER = 134_217_729;

/** Σ weights[k·stride] · values[k], rounded once at the end. */
export function exactDot(
  weights: Float64Array,
  offset: number,
  stride: number,
  values: Float64Array,
): number {
  let high = 0;
  let low = 0;
  for (let k = 0; k < values.length; k += 1) {
    const a = weights[offset + k * stride] ?? 0;
    if (a === 0) continue;
    const b = values[k] ?? 0;
    const product = a * b;
    const aHigh = SPLITTER * a - (SPLITTER * a - a);
    const bHigh = SPLITTER * b - (SPLITTER * b - b);
    const aLow = a - aHigh;
    const bLow = b - bHigh;
    const productError = aLow * bLow - (product - aHigh * bHigh - aLow * bHigh - aHigh * bLow);
    const sum = high + product;
    const part = sum - high;
    const sumError = high - (sum - part) + (product - part);
    high = sum;
    low += productError + sumError;
  }
  return high + low;
}
