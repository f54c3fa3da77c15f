import { requireThat } from '../requirement';
import { bestChain, mostHours, stepBetween } from './meter-chain';
import type { Candidate, ChainStep } from './meter-chain';

/** A reading of one unit's hour meter. */
export type MeterReading = {
  /** The repair at which it was taken, or 'register'. */
  source: string;
  day: number;
  hours: number | null;
  /** Last reading of the old meter, where it was written down when this one began. */
  oldMeterHours?: number | null;
};

/**
 * Why a reading is not used. `missing`: none. `placeholder`: 0, 1 or 9999 that the history does not bear out.
 * `back`: the meter went down. `impossible_rate`: more than 24 hours a day. `typing`: out of line with both
 * neighbors, or right once a factor of ten is taken out.
 */
export type MeterFault = 'missing' | 'placeholder' | 'back' | 'impossible_rate' | 'typing';

export type JudgedReading = MeterReading & {
  fault: MeterFault | null;
  /** Readings on one track can be compared; a meter that restarts unrecorded begins the next track. */
  track: number;
  /** Cumulative hours on the track, over a restart whose old reading is known; `null` where there is a fault. */
  trustedHours: number | null;
};

export type MeterTrack = { track: number; fromDay: number; firstHours: number; lastHours: number };

export type MeterHistory = { readings: JudgedReading[]; tracks: MeterTrack[]; restarts: number };

const PLACEHOLDERS = new Set([0, 1, 9999]);
/** A new machine's meter may well show 0 or 1. */
const NEW_DAYS = 31;

/**
 * Which readings of one unit's hour meter can be used, and which can be compared with which.
 *
 * The readings kept are the largest set that one meter could have shown: never back, never more than 24 hours a
 * day, where a drop to near zero counts as a replaced meter if at least two readings go on from it (or the old
 * meter's last reading was recorded). Where readings exclude each
 * other the slower running is believed, then the earlier reading. Hours of a restarted meter continue those of
 * the old one only where its last reading was recorded; else a new track begins.
 *
 * @param readings in any order; days are day numbers, hours are hours of the meter
 * @throws {RequirementError} where a day is not a whole number
 * @example 100, 4500, 180 h in successive years: 4500 is `typing`, the others are kept.
 */
export function findMeterFaults(
  readings: readonly MeterReading[],
  options: { inServiceDay?: number | null } = {},
): MeterHistory {
  for (const { day } of readings) {
    requireThat(Number.isInteger(day), 'findMeterFaults', 'whole day numbers');
  }
  const inServiceDay = options.inServiceDay ?? null;
  const sorted = [...readings].sort((a, b) => a.day - b.day);
  const judged: JudgedReading[] = sorted.map((r) => ({ ...r, fault: null, track: 0, trustedHours: null }));
  const candidates = readable(judged, inServiceDay);
  const kept = bestChain(candidates);
  return follow(judged, candidates, kept);
}

/** Readings that say something; marks the others. */
function readable(judged: JudgedReading[], inServiceDay: number | null): Candidate[] {
  const plain = judged.filter(({ hours }) => isNumber(hours) && !PLACEHOLDERS.has(hours));
  const candidates: Candidate[] = [];
  let next = 0;
  judged.forEach((reading, index) => {
    const { day, hours } = reading;
    while (next < plain.length && (plain[next]?.day ?? 0) < day) next++;
    const old = reading.oldMeterHours;
    if (!isNumber(hours)) reading.fault = 'missing';
    else if (
      PLACEHOLDERS.has(hours) &&
      !isNumber(old) &&
      !isBorneOut(reading, hours, plain, next, inServiceDay)
    ) {
      reading.fault = 'placeholder';
    } else if (inServiceDay !== null && day >= inServiceDay && hours > mostHours(day - inServiceDay)) {
      reading.fault = 'impossible_rate';
    } else candidates.push({ index, day, hours, oldMeterHours: isNumber(old) ? old : null });
  });
  return candidates;
}

/** 0 and 1 on a machine that is new; any of the three where both neighbors, or the rate so far, lead up to it. */
function isBorneOut(
  reading: MeterReading,
  hours: number,
  plain: readonly MeterReading[],
  next: number,
  inServiceDay: number | null,
): boolean {
  const before = plain[next - 1];
  const after = plain[next];
  if (hours <= 1 && inServiceDay !== null && Math.abs(reading.day - inServiceDay) <= NEW_DAYS) return true;
  if (hours <= 1)
    return before === undefined && after !== undefined && continuesAtUsualRate(plain, reading, hours);
  const beforeHours = before?.hours ?? null;
  if (before === undefined || beforeHours === null || beforeHours < 9000) return false;
  return beforeHours <= hours && hours - beforeHours <= mostHours(reading.day - before.day);
}

/** The step to the first real reading is no faster than twice the machine's own later rate. */
function continuesAtUsualRate(plain: readonly MeterReading[], reading: MeterReading, hours: number): boolean {
  const first = plain[0];
  const last = plain[plain.length - 1];
  if (!first || !last || first.hours === null || last.hours === null || last.day <= first.day) return false;
  const usual = (last.hours - first.hours) / (last.day - first.day);
  return first.hours - hours <= 2 * usual * (first.day - reading.day);
}

/** Cumulative hours along the chain; what was left out of it gets its fault. */
function follow(
  judged: JudgedReading[],
  candidates: readonly Candidate[],
  chain: readonly ChainStep[],
): MeterHistory {
  const tracks: MeterTrack[] = [];
  let offsetHours = 0;
  let restarts = 0;
  let link = 0;
  let previous: Candidate | null = null;
  let current: MeterTrack | undefined;
  for (const [position, candidate] of candidates.entries()) {
    const reading = judged[candidate.index];
    if (!reading) continue;
    const here = chain[link];
    if (here?.position !== position) {
      const upcoming = here && here.step !== 'restart' ? candidates[here.position] : undefined;
      reading.fault = faultOf(candidate, previous, upcoming ?? null);
      reading.track = current?.track ?? 0;
      continue;
    }
    link++;
    if (here.step === 'restart') {
      restarts++;
      if (candidate.oldMeterHours === null) current = undefined;
      else offsetHours += candidate.oldMeterHours;
    }
    if (!current) {
      offsetHours = 0;
      current = {
        track: tracks.length,
        fromDay: candidate.day,
        firstHours: candidate.hours,
        lastHours: candidate.hours,
      };
      tracks.push(current);
    }
    current.lastHours = Math.max(current.lastHours, candidate.hours + offsetHours);
    reading.track = current.track;
    reading.trustedHours = current.lastHours;
    previous = candidate;
  }
  carryTracks(judged);
  return { readings: judged, tracks, restarts };
}

/** A reading that is not used stands on the track of the one before it. */
function carryTracks(judged: JudgedReading[]): void {
  let track = 0;
  for (const reading of judged) {
    if (reading.trustedHours === null) reading.track = track;
    else track = reading.track;
  }
}

function faultOf(reading: Candidate, before: Candidate | null, after: Candidate | null): MeterFault {
  for (const factor of [10, 100, 0.1, 0.01]) {
    const meant = { ...reading, hours: reading.hours * factor };
    const fitsBefore = before !== null && stepBetween(before, meant) === 'on';
    const fitsAfter = after !== null && stepBetween(meant, after) === 'on';
    if ((before === null || fitsBefore) && (after === null || fitsAfter) && (fitsBefore || fitsAfter)) {
      if (after !== null || isCloser(meant.hours, reading.hours, before?.hours ?? 0)) return 'typing';
    }
  }
  if (before !== null && reading.hours < before.hours) return 'back';
  if (before !== null && reading.hours - before.hours > mostHours(reading.day - before.day))
    return 'impossible_rate';
  return 'typing';
}

/** Without a later reading to confirm it, a factor of ten is believed only where it brings the reading near. */
function isCloser(meantHours: number, hours: number, beforeHours: number): boolean {
  return (
    Math.abs(meantHours - beforeHours) < 0.25 * Math.abs(hours - beforeHours) &&
    meantHours <= 1.5 * beforeHours
  );
}

function isNumber(hours: number | null | undefined): hours is number {
  return typeof hours === 'number' && Number.isFinite(hours) && hours >= 0;
}
