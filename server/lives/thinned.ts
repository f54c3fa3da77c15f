/** Evenly spaced rows of a long curve, the first and the last among them; every row that is kept is exact. */
export function thinned<Row>(rows: readonly Row[], most: number): Row[] {
  if (rows.length <= most) return [...rows];
  const step = (rows.length - 1) / (most - 1);
  return Array.from({ length: most }, (_, at) => rows[Math.round(at * step)]).filter(
    (row) => row !== undefined,
  );
}
