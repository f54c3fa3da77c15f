// What every function shares
export type { Interval, LifeObservation, LineReason, NotEstimable, WarningCode } from './types';
export { RequirementError } from './requirement';

// Life of a part
export { bLife } from './life/b-life';
export { cumulativeIncidence } from './life/cumulative-incidence';
export type { CauseObservation, IncidenceRow } from './life/cumulative-incidence';
export { fitWeibull } from './life/fit-weibull';
export type { LimitsMethod, WeibullFit, WeibullReason } from './life/fit-weibull';
export { compareWeibull } from './life/compare-weibull';
export type { WeibullComparison } from './life/compare-weibull';
export { hazardRatio } from './life/hazard-ratio';
export type { HazardRatio } from './life/hazard-ratio';
export { kaplanMeier } from './life/kaplan-meier';
export type { SurvivalRow } from './life/kaplan-meier';
export { lifeQuantile } from './life/life-quantile';
export { logRankTest } from './life/log-rank-test';
export type { LogRankTest } from './life/log-rank-test';
export { medianRankRegression } from './life/median-rank-regression';
export type { RankRegression } from './life/median-rank-regression';
export { medianRanks } from './life/median-ranks';
export { nelsonAalen } from './life/nelson-aalen';
export type { HazardRow } from './life/nelson-aalen';
export { probabilityPlot } from './life/probability-plot';
export type { PlotPoint } from './life/probability-plot';
export { scaleLowerBound } from './life/scale-lower-bound';

// A machine that is repaired again and again
export type { EventSeries } from './machine/event-series';
export { fitPowerLaw } from './machine/fit-power-law';
export type { PowerLawFit } from './machine/fit-power-law';
export { laplaceTest } from './machine/laplace-test';
export type { LaplaceTest } from './machine/laplace-test';
export { meanCumulativeFunction } from './machine/mean-cumulative-function';
export type { MeanCumulativeRow, RepairHistory } from './machine/mean-cumulative-function';
export { meanTimeBetweenFailures } from './machine/mean-time-between-failures';
export type { MeanTimeBetweenFailures } from './machine/mean-time-between-failures';

// Rates and comparisons of counts
export { benjaminiHochberg } from './rates/benjamini-hochberg';
export { clopperPearsonInterval } from './rates/clopper-pearson-interval';
export { exactBinomialLimits } from './rates/exact-binomial-limits';
export { fisherExact } from './rates/fisher-exact';
export type { FisherResult } from './rates/fisher-exact';
export { poissonRateRatio } from './rates/poisson-rate-ratio';
export type { RateRatio } from './rates/poisson-rate-ratio';
export type { ProportionEstimate } from './rates/proportion';
export { proportionChart } from './rates/proportion-chart';
export type { ChartPoint, ProportionChart } from './rates/proportion-chart';
export { shrinkProportions } from './rates/shrink-proportions';
export type { ShrunkenProportions } from './rates/shrink-proportions';
export { wilsonInterval } from './rates/wilson-interval';

// What to check first, what will be needed
export { checkOrder } from './planning/check-order';
export type { Check } from './planning/check-order';
export type { FittedLife, Forecast } from './planning/conditional-failure';
export { expectedFailures } from './planning/expected-failures';
export type { ExpectedFailures } from './planning/expected-failures';
export { failureCountQuantile } from './planning/failure-count-quantile';

// What takes what with it
export * from './cascades/index';

// From closed records to lives, comebacks and rates
export * from './records/index';
