import type { RepairListed } from '../../../shared/repairs';
import { Finding, Over, Strong } from '../../components/ui/finding';
import type { Formats } from '../../lib/format';
import type { RepairFilters } from './repair-filters';

type Props = {
  rows: readonly RepairListed[];
  hasMore: boolean;
  filters: RepairFilters;
  formats: Formats;
};

/** What the list holds, as far as it has been fetched: no more than its rows say. */
export function RepairsSentence({ rows, hasMore, filters, formats }: Props) {
  const [newest] = rows;
  const oldest = rows.at(-1);
  if (!newest || !oldest) return null;
  const about = [
    filters.q ? ` with “${filters.q}”` : '',
    filters.cameBack === 'yes'
      ? ' that came back'
      : filters.cameBack === 'no'
        ? ' that did not come back'
        : '',
  ].join('');
  const back = rows.filter(({ cameBackAfterDays }) => cameBackAfterDays !== null).length;
  return (
    <Finding>
      {hasMore ? 'The latest ' : ''}
      <Strong>{formats.counted(rows.length, 'repair')}</Strong>
      {about}, done{' '}
      {newest.workOn === oldest.workOn
        ? `on ${formats.day(newest.workOn)}`
        : `between ${formats.day(oldest.workOn)} and ${formats.day(newest.workOn)}`}
      {filters.cameBack === undefined && (
        <>
          :{' '}
          {back === 0 ? (
            'none of them has come back'
          ) : (
            <Over>
              {back === 1 ? '1 of them has come back' : `${formats.count(back)} of them have come back`}
            </Over>
          )}{' '}
          for the same trouble so far
        </>
      )}
      .
    </Finding>
  );
}
