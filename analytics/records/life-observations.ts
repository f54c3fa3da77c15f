import { requireThat } from '../requirement';
import type { LifeObservation } from '../types';
import type { LifeSpan, PartLife } from './part-life';

export type LifeClock = 'hours' | 'days';

/**
 * What to make of replacements whose reason is not recorded: `known` leaves them out, `allFailed` and `noneFailed`
 * are the bounds between which the truth lies.
 */
export type ReasonBounds = 'known' | 'allFailed' | 'noneFailed';

export type ObservationOptions = {
  clock: LifeClock;
  /** Default `known`. */
  reasonBounds?: ReasonBounds;
  /** Also lives whose beginning was not seen, by delayed entry; default false. */
  assumedOriginal?: boolean;
  /** Only lives of these part numbers; `null` stands for "original, or number not recorded". */
  partIds?: readonly (string | null)[];
};

/** What the observations rest on, and what was left out and why. Every life is counted once. */
export type LifeCoverage = {
  lives: number;
  used: number;
  failures: number;
  leftOut: {
    assumedOriginal: number;
    unknownReason: number;
    /** No reading, or no day, at one end. */
    noClock: number;
    /** No time under observation yet. */
    noTime: number;
  };
  /** Among those used. */
  deadOnArrival: number;
  cutAtMeterRestart: number;
  /** With an end whose hours lie between two readings. */
  between: number;
  competingDamage: number;
  /** Lives used of units that are in the register: without any, a result holds "among machines that came in". */
  inRegister: number;
};

/** One row for `cumulativeIncidence`: `cause` is 'failed', 'damage' or `null` where it was still running. */
export type CauseObservation = { time: number; cause: 'failed' | 'damage' | null; entry?: number };

/** Lives as observations on one clock, with the count of what was left out. Damage by other parts censors. */
export function toObservations(
  lives: readonly PartLife[],
  options: ObservationOptions,
): { observations: LifeObservation[]; coverage: LifeCoverage } {
  const { rows, coverage } = toCauseObservations(lives, options);
  const observations = rows.map(({ cause, ...row }) => ({ ...row, failed: cause === 'failed' }));
  return { observations, coverage };
}

/** As `toObservations`, with damage by other parts as a cause of its own (`cumulativeIncidence`). */
export function toCauseObservations(
  lives: readonly PartLife[],
  options: ObservationOptions,
): { rows: CauseObservation[]; coverage: LifeCoverage } {
  const { clock, reasonBounds = 'known', assumedOriginal = false } = options;
  requireThat(clock === 'hours' || clock === 'days', 'toObservations', 'the clock to be hours or days');
  const wanted = options.partIds ? new Set(options.partIds) : null;
  const coverage: LifeCoverage = {
    lives: 0,
    used: 0,
    failures: 0,
    leftOut: { assumedOriginal: 0, unknownReason: 0, noClock: 0, noTime: 0 },
    deadOnArrival: 0,
    cutAtMeterRestart: 0,
    between: 0,
    competingDamage: 0,
    inRegister: 0,
  };
  const rows: CauseObservation[] = [];
  for (const life of lives) {
    if (wanted && !wanted.has(life.partId)) continue;
    coverage.lives++;
    const span = life[clock];
    const cause = causeOf(life, span, reasonBounds);
    if (life.origin === 'assumed_original' && !assumedOriginal) coverage.leftOut.assumedOriginal++;
    else if (span === null) coverage.leftOut.noClock++;
    else if (cause === 'leftOut') coverage.leftOut.unknownReason++;
    else if (span.exit <= span.entry) coverage.leftOut.noTime++;
    else {
      rows.push(span.entry > 0 ? { time: span.exit, cause, entry: span.entry } : { time: span.exit, cause });
      coverage.used++;
      if (cause === 'failed') coverage.failures++;
      if (cause === 'damage') coverage.competingDamage++;
      if (life.isDeadOnArrival) coverage.deadOnArrival++;
      if (span.isCut) coverage.cutAtMeterRestart++;
      if (span.isBetween) coverage.between++;
      if (life.isUnitInRegister) coverage.inRegister++;
    }
  }
  return { rows, coverage };
}

/** Hours where at least 80 % of the lives whose beginning is known have them; else days. */
export function chooseClock(lives: readonly PartLife[]): LifeClock {
  let withHours = 0;
  let all = 0;
  for (const life of lives) {
    if (life.origin === 'assumed_original') continue;
    all++;
    if (life.hours !== null) withHours++;
  }
  return all > 0 && withHours >= 0.8 * all ? 'hours' : 'days';
}

function causeOf(
  life: PartLife,
  span: LifeSpan | null,
  bounds: ReasonBounds,
): CauseObservation['cause'] | 'leftOut' {
  if (span?.isCut || life.outcome === 'censored') return null;
  if (life.outcome !== 'unknown') return life.outcome;
  if (bounds === 'known') return 'leftOut';
  return bounds === 'allFailed' ? 'failed' : null;
}
