import type { Random } from './random';
import type { LineReason } from './visits';

const MISSING_HOURS = 0.12;
const ROUNDED_HOURS = 0.16;
const MISTYPED_HOURS = 0.006;
const UNKNOWN_REASON = 0.06;
const MISCODED_REASON = 0.03;

function mistype(random: Random, hours: number): string {
  const digits = String(Math.round(hours));
  if (digits.length < 3) return `${digits}0`;
  return random.chance(0.5) ? digits.slice(1) : `${digits.slice(0, 1)}${digits}`;
}

/** The reading as somebody wrote it down: missing, rounded to tens, mistyped, or right. */
export function writtenHours(random: Random, hours: number | null): string {
  if (hours === null || random.chance(MISSING_HOURS)) return '';
  if (random.chance(MISTYPED_HOURS)) return mistype(random, hours);
  if (hours > 40 && random.chance(ROUNDED_HOURS)) return String(Math.round(hours / 10) * 10);
  return hours.toFixed(1);
}

/** The reason as somebody coded it: left out, mixed up, or right. */
export function writtenReason(random: Random, reason: LineReason | ''): LineReason | '' {
  if (reason === '' || random.chance(UNKNOWN_REASON)) return '';
  if (!random.chance(MISCODED_REASON)) return reason;
  if (reason === 'failed') return random.pick(['maintenance', 'preventive', 'damage'] as const);
  return reason === 'maintenance' ? random.pick(['failed', 'preventive'] as const) : 'failed';
}
