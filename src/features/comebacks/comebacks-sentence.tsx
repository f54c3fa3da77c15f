import { useSuspenseQuery } from '@tanstack/react-query';
import { Finding, Over, Strong } from '../../components/ui/finding';
import type { Formats } from '../../lib/format';
import type { ComebackFilters } from './comeback-filters';
import { modelRatesQuery, technicianRatesQuery, waitingQuery } from './queries';

type Props = { filters: ComebackFilters; formats: Formats };

/** How many wait for a word, and how many were the shop's own doing. */
export function ComebacksSentence({ filters, formats }: Props) {
  const { data: waiting } = useSuspenseQuery(waitingQuery({ ...filters, status: undefined }));
  return (
    <Finding>
      {waiting.count === 0 ? (
        'No comeback waits to be looked at'
      ) : (
        <>
          <Over>
            {waiting.isMore ? 'More than ' : ''}
            {formats.counted(waiting.count, 'comeback')}
          </Over>{' '}
          {waiting.count === 1 ? 'waits' : 'wait'} to be looked at
        </>
      )}
      {filters.modelId || filters.componentId ? '.' : <Ours filters={filters} formats={formats} />}
    </Finding>
  );
}

function Ours({ filters, formats }: Props) {
  const { from, to, technicianId } = filters;
  const { data } = useSuspenseQuery(
    technicianId ? technicianRatesQuery({ from, to }) : modelRatesQuery({ from, to }),
  );
  const rows = data.data.filter(({ key }) => !technicianId || key === technicianId);
  const count = rows.reduce((sum, row) => sum + row.count, 0);
  const ours = rows.reduce((sum, row) => sum + row.oursCount, 0);
  if (count === 0) return <>; none of the work old enough to judge came back.</>;
  return (
    <>
      . Of {formats.count(count)} that count{from || to ? ' for work of these days' : ''},{' '}
      <Strong>{formats.count(ours)}</Strong> {ours === 1 ? 'is' : 'are'} confirmed as ours.
    </>
  );
}

type OwnProps = { count: number; hasMore: boolean; isNarrowed: boolean; formats: Formats };

/** For who did the first repair: help, not a rate. */
export function OwnSentence({ count, hasMore, isNarrowed, formats }: OwnProps) {
  if (count === 0)
    return (
      <Finding>
        None of your repairs{isNarrowed ? ' chosen here' : ''} came back for the same trouble.
      </Finding>
    );
  return (
    <Finding>
      <Strong>
        {hasMore ? 'The latest ' : ''}
        {formats.count(count)}
      </Strong>{' '}
      of your repairs that came back, and the repairs that followed: what cured them is written there.
    </Finding>
  );
}
