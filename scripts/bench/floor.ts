/**
 * The arithmetic floor of this machine for a system: six times one exponential per dissolved species and one
 * Cholesky factorisation of the order of the components.
 */
const ROUNDS = 6;

function cholesky(a: Float64Array, n: number): void {
  for (let j = 0; j < n; j += 1) {
    for (let k = 0; k < j; k += 1) {
      const share = a[j * n + k] ?? 0;
      for (let i = j; i < n; i += 1) a[i * n + j] = (a[i * n + j] ?? 0) - share * (a[i * n + k] ?? 0);
    }
    const root = 1 / Math.sqrt(a[j * n + j] ?? 1);
    for (let i = j; i < n; i += 1) a[i * n + j] = (a[i * n + j] ?? 0) * root;
  }
}

/** @returns what is to be timed; its result must be used, so that no compiler drops it */
export function arithmeticFloor(speciesCount: number, componentCount: number): () => number {
  const n = componentCount;
  const exponents = Float64Array.from({ length: speciesCount }, (_, index) => -1 - 0.37 * index);
  const values = new Float64Array(speciesCount);
  const kept = Float64Array.from({ length: n * n }, (_, k) =>
    k % (n + 1) === 0 ? n + 1 : 1 / (1 + (k % 7)),
  );
  const matrix = new Float64Array(n * n);
  return () => {
    for (let round = 0; round < ROUNDS; round += 1) {
      for (let index = 0; index < speciesCount; index += 1)
        values[index] = Math.exp((exponents[index] ?? 0) + round);
      matrix.set(kept);
      cholesky(matrix, n);
    }
    return (values[speciesCount - 1] ?? 0) + (matrix[n * n - 1] ?? 0);
  };
}
