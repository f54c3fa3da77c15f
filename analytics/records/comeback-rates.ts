import { exactBinomialLimits } from '../rates/exact-binomial-limits';
import { wilsonInterval } from '../rates/wilson-interval';
import { requireThat } from '../requirement';
import type { Interval } from '../types';
import { repairOutcomes } from './comeback-outcomes';
import type { AlikeRepairs, RateComeback, RateRepair, RepairOutcome } from './comeback-outcomes';
import { monthAfter, monthBefore, monthBounds, monthOf } from './day-number';
import { projectReturns, returnCurve } from './project-returns';
import { groupRows } from './record-types';
import { shrinkRates } from './shrink-rates';
import { windowClock } from './window-clock';
import type { WindowClock } from './window-clock';

/** Months that the limits look back on, and how many it takes before there are any. */
const MOST_BASE_MONTHS = 24;
const FEWEST_BASE_MONTHS = 6;

export type ComebackRateRow = {
  /** 'YYYY-MM' where rows are months, else `null`. */
  month: string | null;
  /** The month, or the id of the model, component or technician. */
  key: string;
  /** Repairs that came back with the same trouble, and repairs that could. */
  count: number;
  size: number;
  rate: number | null;
  /** Wilson, 95 %. */
  interval: Interval;
  oursCount: number;
  oursRate: number | null;
  /** Some of its repairs can still come back within the window. */
  maturing: boolean;
  /** Where maturing: the rate to expect once it is judged. */
  projected: number | null;
  /** Months: rates between which a month of this size gives no signal. */
  limits: Interval | null;
  /** Months: the rate of the base months, around which the limits stand. */
  center: number | null;
  /** Months that can be judged: outside the limits. */
  signal: 'high' | 'low' | null;
  /** Other rows: after allowing for few jobs. */
  shrunken: number | null;
  shrunkenInterval: Interval | null;
};

export type ComebackRateInput = {
  repairs: readonly RateRepair[];
  /** More repairs, none of which any comeback names: counted, so that a shop of many years need not be listed. */
  others?: readonly AlikeRepairs[];
  comebacks: readonly RateComeback[];
  asOfDay: number;
  windowDays: number;
  pausedMonths?: readonly number[];
};

/**
 * Comeback rates by month of the first repair, or by model, component or technician.
 *
 * A row counts repairs whose work was done in the month and that came back, among those that could. Months run on
 * without gaps up to the month of `asOfDay`; pass all repairs and cut the rows, for limits and projection look back.
 * Limits are exact binomial, 0.135 % each side, for the month's size around the rate of the ≤ 24 months before it
 * that can be judged (the month itself left out), none before 6 of them. A repair with several components or
 * technicians stands in the row of each. Shrinkage is beta-binomial over the rows.
 *
 * @throws {RequirementError} where the window is not positive
 */
export function comebackRates(
  input: ComebackRateInput & { by: 'month' | 'model' | 'component' | 'technician' },
): ComebackRateRow[] {
  const { asOfDay, windowDays, by } = input;
  requireThat(windowDays > 0, 'comebackRates', 'a window of more than 0 days');
  const daysOf = windowClock(input.pausedMonths);
  const outcomes = repairOutcomes(
    [...input.repairs, ...(input.others ?? [])],
    input.comebacks,
    asOfDay,
    daysOf,
  );
  if (by === 'month') return monthRows(outcomes, asOfDay, windowDays, daysOf);
  const curve = returnCurve(outcomes, windowDays);
  const rows = [...groupByKeys(outcomes, by)].map(([key, group]) => {
    const maturing = group.some(({ ageDays }) => ageDays < windowDays);
    return {
      ...rowOf(key, group),
      maturing,
      projected: maturing ? projectReturns(group, curve, windowDays) : null,
    };
  });
  return shrinkRates(rows);
}

/** The latest month all of whose repairs are as old as the window on the day of the analysis. */
export function latestJudgeableMonth(
  asOfDay: number,
  windowDays: number,
  pausedMonths: readonly number[] = [],
): string {
  const daysOf = windowClock(pausedMonths);
  let month = monthOf(asOfDay);
  while (isMaturing(month, asOfDay, windowDays, daysOf)) month = monthBefore(month);
  return month;
}

function monthRows(
  outcomes: readonly RepairOutcome[],
  asOfDay: number,
  windowDays: number,
  daysOf: WindowClock,
): ComebackRateRow[] {
  const ordered = [...outcomes].sort((a, b) => a.workDay - b.workDay);
  const first = ordered[0];
  if (!first) return [];
  const groups = groupRows(ordered, ({ workDay }) => monthOf(workDay));
  const base: { count: number; size: number }[] = [];
  const rows: ComebackRateRow[] = [];
  let seen = 0;
  const lastMonth = monthOf(asOfDay);
  for (let month = monthOf(first.workDay); month <= lastMonth; month = monthAfter(month)) {
    const group = groups.get(month) ?? [];
    const maturing = isMaturing(month, asOfDay, windowDays, daysOf);
    const row = { ...rowOf(month, group), month, maturing, ...limitsOf(sizeOf(group), base) };
    if (maturing)
      row.projected = projectReturns(group, returnCurve(ordered.slice(0, seen), windowDays), windowDays);
    else row.signal = signalOf(row);
    rows.push(row);
    seen += group.length;
    if (!maturing && row.size > 0) base.push(row);
    if (base.length > MOST_BASE_MONTHS) base.shift();
  }
  return rows;
}

function isMaturing(month: string, asOfDay: number, windowDays: number, daysOf: WindowClock): boolean {
  return daysOf(monthBounds(month).lastDay, asOfDay) < windowDays;
}

function limitsOf(
  size: number,
  base: readonly { count: number; size: number }[],
): Pick<ComebackRateRow, 'limits' | 'center'> {
  if (base.length < FEWEST_BASE_MONTHS) return { limits: null, center: null };
  const total = base.reduce((sum, month) => sum + month.size, 0);
  const center = base.reduce((sum, month) => sum + month.count, 0) / total;
  if (size === 0) return { limits: null, center };
  const { lower, upper } = exactBinomialLimits(size, center);
  return { limits: { lower: lower / size, upper: upper / size }, center };
}

function signalOf({ rate, limits }: ComebackRateRow): ComebackRateRow['signal'] {
  if (rate === null || limits === null) return null;
  if (limits.upper !== null && rate > limits.upper) return 'high';
  return limits.lower !== null && rate < limits.lower ? 'low' : null;
}

function groupByKeys(
  outcomes: readonly RepairOutcome[],
  by: 'model' | 'component' | 'technician',
): Map<string, RepairOutcome[]> {
  const rows = outcomes.flatMap((outcome) => keysOf(outcome, by).map((key) => ({ key, outcome })));
  const groups = [...groupRows(rows, ({ key }) => key)].sort(([a], [b]) => (a < b ? -1 : 1));
  return new Map(groups.map(([key, group]) => [key, group.map(({ outcome }) => outcome)]));
}

function keysOf(outcome: RepairOutcome, by: 'model' | 'component' | 'technician'): readonly string[] {
  if (by === 'model') return outcome.modelId === null ? [] : [outcome.modelId];
  return [...new Set(by === 'component' ? outcome.componentIds : outcome.technicianIds)];
}

const sizeOf = (group: readonly RepairOutcome[]): number =>
  group.reduce((size, { repairs }) => size + repairs, 0);

function rowOf(key: string, group: readonly RepairOutcome[]): ComebackRateRow {
  const size = sizeOf(group);
  const count = sizeOf(group.filter(({ isReturned }) => isReturned));
  const oursCount = sizeOf(group.filter(({ isOurs }) => isOurs));
  const { estimate: rate, lower, upper } = wilsonInterval(count, size);
  return {
    month: null,
    key,
    count,
    size,
    rate,
    interval: { lower, upper },
    oursCount,
    oursRate: size === 0 ? null : oursCount / size,
    maturing: false,
    projected: null,
    limits: null,
    center: null,
    signal: null,
    shrunken: null,
    shrunkenInterval: null,
  };
}
