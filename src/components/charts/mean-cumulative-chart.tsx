import { StepChart, type StepChartProps } from './step-chart';

type Props = Omit<StepChartProps, 'start' | 'yTicks' | 'underLabel'> & { highest: number };

/** Repairs that a machine has had on average by each age, with its band, and how many machines were watched. */
export function MeanCumulativeChart({ highest, ...props }: Props) {
  return <StepChart {...props} start={0} yTicks={countTicks(highest)} underLabel="watched" />;
}

/** Up to six round steps that reach at least `highest`. */
function countTicks(highest: number): number[] {
  const step = [0.05, 0.1, 0.25, 0.5, 1, 2, 5, 10, 20, 50, 100].find((size) => highest / size <= 5) ?? 200;
  return Array.from({ length: Math.max(1, Math.ceil(highest / step)) + 1 }, (_, index) => index * step);
}
