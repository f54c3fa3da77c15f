/** One measured figure. */
export type Measure = { name: string; value: number; unit: string };

/** A table for people and the same as JSON, for comparing one run with another. */
export function report(title: string, measures: readonly Measure[]): void {
  const width = Math.max(...measures.map(({ name }) => name.length));
  process.stdout.write(`\n${title}\n`);
  for (const { name, value, unit } of measures) {
    process.stdout.write(`  ${name.padEnd(width)}  ${Number(value.toPrecision(5))} ${unit}\n`);
  }
}
