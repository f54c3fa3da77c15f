// What closed repair records say, as plain rows: days of business, units, repairs, lines
export { dayNumber, dayText, monthAfter, monthBefore, monthBounds, monthOf } from './day-number';
export { openingDay, workDay } from './record-types';
export type {
  RecordComponent,
  RecordLine,
  RecordRepair,
  RecordUnit,
  TicketType,
  WorkDone,
} from './record-types';

// The hour meter
export { findMeterFaults } from './meter-faults';
export type { JudgedReading, MeterFault, MeterHistory, MeterReading, MeterTrack } from './meter-faults';
export { judgeUnitMeter } from './unit-visits';

// Part lives
export { deriveLives, deriveLivesOfUnit, modelComponents } from './derive-lives';
export type { LifeSpan, MissingSpan, PartLife } from './part-life';
export { chooseClock, toCauseObservations, toObservations } from './life-observations';
export type {
  CauseObservation,
  LifeClock,
  LifeCoverage,
  ObservationOptions,
  ReasonBounds,
} from './life-observations';

// Comebacks
export { repairFacts } from './repair-facts';
export type { RepairFacts } from './repair-facts';
export { findComebacks } from './find-comebacks';
export type { ComebackOptions } from './find-comebacks';
export { standing } from './comeback-types';
export type {
  CascadeLink,
  Comeback,
  ComebackDecision,
  ComebackNote,
  ComebackReason,
  ComebackStatus,
} from './comeback-types';
export { readsAsTrouble, STARTER_COMPLAINT_PHRASES, systemReader } from './trouble-words';
export type { ComplaintPhrase } from './trouble-words';

// Rates of return
export { comebackRates, latestJudgeableMonth } from './comeback-rates';
export type { ComebackRateInput, ComebackRateRow } from './comeback-rates';
export type { AlikeRepairs, RateComeback, RateRepair } from './comeback-outcomes';
export { byTheDoor, firstVisitCure } from './first-visit-cure';
export { comebackDrivers } from './comeback-drivers';
export type { ComebackDriver } from './comeback-drivers';

// A machine that is repaired again and again
export { recurrence } from './recurrence';
export type { ModelRecurrence, RepairHistory } from './recurrence';
