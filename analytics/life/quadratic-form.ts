/**
 * uᵀ V⁻ u and the rank of V, for a covariance V that may be singular (u in its range): elimination with
 * the largest remaining pivot, stopped where what remains is rounding.
 */
export function quadraticForm(
  covariance: readonly (readonly number[])[],
  vector: readonly number[],
): { value: number; rank: number } {
  const matrix = covariance.map((row) => [...row]);
  const rest = [...vector];
  const largest = Math.max(...matrix.map((row, i) => row[i] ?? 0));
  const left = new Set(matrix.keys());
  let value = 0;
  let rank = 0;
  while (left.size > 0) {
    const pivot = [...left].reduce((best, i) => (at(matrix, i, i) > at(matrix, best, best) ? i : best));
    const size = at(matrix, pivot, pivot);
    if (!(size > 1e-10 * largest)) break;
    left.delete(pivot);
    const lead = rest[pivot] ?? 0;
    value += (lead * lead) / size;
    rank++;
    for (const i of left) {
      const factor = at(matrix, i, pivot) / size;
      rest[i] = (rest[i] ?? 0) - factor * lead;
      const row = matrix[i] ?? [];
      for (const j of left) row[j] = (row[j] ?? 0) - factor * at(matrix, pivot, j);
    }
  }
  return { value, rank };
}

function at(matrix: readonly (readonly number[])[], row: number, column: number): number {
  return matrix[row]?.[column] ?? 0;
}
