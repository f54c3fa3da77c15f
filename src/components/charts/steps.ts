type Scale = (value: number) => number;
export type Step = { at: number; value: number };
export type BandStep = { at: number; lower: number | null; upper: number | null };

/** A staircase from `start` that keeps each value until the next step, and ends at `end`. */
export function stairs(start: Step, steps: readonly Step[], end: number, x: Scale, y: Scale): string {
  const drawn = steps.map(({ at, value }) => `H${x(at)}V${y(value)}`);
  return `M${x(start.at)} ${y(start.value)}${drawn.join('')}H${x(end)}`;
}

/** The band between the limits of a staircase; where a limit is missing it is open. */
export function stairBand(steps: readonly BandStep[], end: number, x: Scale, y: Scale): string {
  const runs: { at: number; until: number; lower: number; upper: number }[][] = [];
  let isOpen = false;
  for (const [index, { at, lower, upper }] of steps.entries()) {
    if (lower === null || upper === null) {
      isOpen = false;
      continue;
    }
    if (!isOpen) runs.push([]);
    runs.at(-1)?.push({ at, until: steps[index + 1]?.at ?? end, lower, upper });
    isOpen = true;
  }
  return runs
    .map((run) => {
      const [first] = run;
      if (!first) return '';
      const above = run.map(({ upper, until }) => `V${y(upper)}H${x(until)}`).join('');
      const below = [...run].reverse().map(({ at, lower }) => `V${y(lower)}H${x(at)}`);
      return `M${x(first.at)} ${y(first.upper)}${above}${below.join('')}Z`;
    })
    .join('');
}
