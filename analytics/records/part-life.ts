import type { LineReason } from '../types';

/** Age under observation on one clock: at risk from `entry` (exclusive) to `exit`. */
export type LifeSpan = {
  entry: number;
  exit: number;
  /** The meter restarted within the life: it is known running up to `exit`, and what came after is set aside. */
  isCut: boolean;
  /** An end without a reading of its own lies on the line between the machine's readings before and after it. */
  isBetween?: boolean;
};

/** Why a life has no hours, or no days. */
export type MissingSpan =
  | 'no_reading_at_start'
  | 'no_reading_at_end'
  | 'meter_restarted'
  | 'no_in_service_day'
  | 'in_service_after_visit';

/** One installation of one component in one unit. */
export type PartLife = {
  /** Unit, component and installation: the same at every computation from the same records. */
  id: string;
  unitId: string;
  modelId: string | null;
  componentId: string;
  /** 0 for the engine the unit was first seen with; grows when it is swapped. */
  engine: number;
  /** What was fitted; `null` for an original part, or where the line has no number. */
  partId: string | null;
  partMaker: string | null;
  /** `assumed_original`: its history before `entry` is not known. */
  origin: 'fitted' | 'in_service' | 'assumed_original';
  startRepairId: string | null;
  startDay: number | null;
  endRepairId: string | null;
  endDay: number;
  /** `damage` is a competing cause; `unknown` is a replacement whose reason is not recorded. */
  outcome: 'failed' | 'damage' | 'censored' | 'unknown';
  endReason: LineReason | 'running' | 'engine_swapped' | null;
  hours: LifeSpan | null;
  hoursMissing: MissingSpan | null;
  days: LifeSpan | null;
  daysMissing: MissingSpan | null;
  /** Failed at 0: its age is set to half the resolution of the clock, 0.05 hour or 0.5 day. */
  isDeadOnArrival: boolean;
  isUnitInRegister: boolean;
};
