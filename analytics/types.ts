/** One life: a time on one clock, whether it ended in failure, and from when it was under observation. */
export type LifeObservation = {
  /** Age at failure or at the last time it was known running; same unit throughout (hours, days). */
  time: number;
  failed: boolean;
  /** Age from which the life was observed (delayed entry); 0 when absent. */
  entry?: number;
  /** How many equal lives this row stands for; 1 when absent. */
  weight?: number;
};

/** Confidence limits; `null` is an infinite or undefined limit. */
export type Interval = { lower: number | null; upper: number | null };

/** "The data cannot answer" is a result, with the reason in a stable code. */
export type NotEstimable<Reason extends string = string> = { kind: 'notEstimable'; reason: Reason };

/** What a reader of an estimate must be told beside it. */
export type WarningCode =
  /** Fewer than six failures: the estimate stands, its limits say how little it rests on. */
  | 'fewFailures'
  /** The proportions differ no more than chance alone would make them: one common rate is given. */
  | 'noSpread';

/** Why a part was replaced; `null` where the record does not say. */
export type LineReason = 'failed' | 'maintenance' | 'preventive' | 'damage' | 'upgrade';
