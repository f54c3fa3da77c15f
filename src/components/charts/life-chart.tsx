import { StepChart, type StepChartProps } from './step-chart';

const QUARTERS = [0, 0.25, 0.5, 0.75, 1] as const;

type Props = Omit<StepChartProps, 'start' | 'yTicks' | 'underLabel'>;

/** Share still running by age: steps with their band, the fitted line, and how many were running. */
export function LifeChart(props: Props) {
  return <StepChart {...props} start={1} yTicks={QUARTERS} underLabel="running" />;
}
