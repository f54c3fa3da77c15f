import type { ModelListed, ModelWhole } from '../../../shared/machines';
import { exactBinomialLimits } from '../../../analytics/rates/exact-binomial-limits';
import type { RateRow } from '../../../shared/reports';

type ModelComponent = ModelWhole['components'][number];

const PATTERNS: Record<ModelComponent['pattern'], string> = {
  young: 'fails young',
  wears_out: 'wears out',
  cannot_tell: 'cannot tell yet',
  no_pattern: 'at any age alike',
  too_few: 'too few to tell',
};

export const patternWords = (pattern: ModelComponent['pattern']): string => PATTERNS[pattern];

/** Came back more, or less, than chance explains for so many jobs. */
export function standsOut(row: RateRow | undefined): 'over' | 'under' | null {
  if (!row || row.rate === null || row.limits === null || row.size === 0) return null;
  if (row.limits.upper !== null && row.rate > row.limits.upper) return 'over';
  if (row.limits.lower !== null && row.rate < row.limits.lower) return 'under';
  return null;
}

/** The shop's share over all rows. */
export function shareOfAll(rows: readonly Pick<RateRow, 'count' | 'size'>[]): number | null {
  const size = rows.reduce((sum, row) => sum + row.size, 0);
  return size === 0 ? null : rows.reduce((sum, row) => sum + row.count, 0) / size;
}

/** What chance allows around the shop's share, for each row's own number of jobs. */
export function withLimits(rows: readonly RateRow[]): RateRow[] {
  const share = shareOfAll(rows);
  return rows.map((row) => {
    if (row.limits !== null || row.size === 0 || share === null) return row;
    const { lower, upper } = exactBinomialLimits(row.size, share);
    return { ...row, limits: { lower: lower / row.size, upper: upper / row.size } };
  });
}

export const mostFailures = <Row extends Pick<ModelListed, 'failures'>>(
  rows: readonly Row[],
): Row | undefined =>
  rows.reduce<Row | undefined>((most, row) => (row.failures > (most?.failures ?? 0) ? row : most), undefined);
