/**
 * Solves A·x = b in place by elimination with partial pivoting.
 * @param a - f × f, row by row; destroyed
 * @param b - right side; holds x afterwards
 * @returns false where A is singular to working precision
 */
export function solveInPlace(a: Float64Array, b: Float64Array, f: number): boolean {
  for (let column = 0; column < f; column += 1) {
    let pivot = column;
    let largest = Math.abs(a[column * f + column] ?? 0);
    for (let row = column + 1; row < f; row += 1) {
      const size = Math.abs(a[row * f + column] ?? 0);
      if (size > largest) {
        largest = size;
        pivot = row;
      }
    }
    if (!(largest > 1e-200)) return false;
    if (pivot !== column) {
      for (let k = column; k < f; k += 1) {
        const kept = a[column * f + k] ?? 0;
        a[column * f + k] = a[pivot * f + k] ?? 0;
        a[pivot * f + k] = kept;
      }
      const kept = b[column] ?? 0;
      b[column] = b[pivot] ?? 0;
      b[pivot] = kept;
    }
    const inverse = 1 / (a[column * f + column] ?? 1);
    for (let row = column + 1; row < f; row += 1) {
      const share = (a[row * f + column] ?? 0) * inverse;
      if (share === 0) continue;
      for (let k = column + 1; k < f; k += 1)
        a[row * f + k] = (a[row * f + k] ?? 0) - share * (a[column * f + k] ?? 0);
      b[row] = (b[row] ?? 0) - share * (b[column] ?? 0);
    }
  }
  for (let row = f - 1; row >= 0; row -= 1) {
    let sum = b[row] ?? 0;
    for (let k = row + 1; k < f; k += 1) sum -= (a[row * f + k] ?? 0) * (b[k] ?? 0);
    b[row] = sum / (a[row * f + row] ?? 1);
  }
  return true;
}
