import { useSuspenseInfiniteQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import { Link, useSearchParams, type LoaderFunctionArgs } from 'react-router';
import type { Comeback } from '../../../shared/comebacks';
import { Button } from '../../components/ui/button';
import { DataTable } from '../../components/ui/data-table';
import { RouteError } from '../../components/ui/error-panel';
import { HowComputed } from '../../components/ui/how-computed';
import { Page } from '../../components/ui/page';
import { Sheet } from '../../components/ui/sheet';
import { EmptyState } from '../../components/ui/states';
import { comebackColumns } from '../../features/comebacks/comeback-columns';
import { ComebackFilterBar } from '../../features/comebacks/comeback-filter-bar';
import { comebackFiltersOf, statusOf } from '../../features/comebacks/comeback-filters';
import { ComebacksSentence, OwnSentence } from '../../features/comebacks/comebacks-sentence';
import { DecideDialog } from '../../features/comebacks/decide-dialog';
import {
  comebacksQuery,
  modelRatesQuery,
  technicianRatesQuery,
  waitingQuery,
} from '../../features/comebacks/queries';
import { queryClient } from '../../lib/query-client';
import { withChanges } from '../../lib/search-params';
import { can, sessionQuery, useCan, useFormats } from '../../lib/session';
import { paths } from '../../paths';

export const ErrorBoundary = RouteError;

export async function loader({ request }: LoaderFunctionArgs) {
  const { shop } = await queryClient.query({ ...sessionQuery, staleTime: 'static' });
  const filters = comebackFiltersOf(new URL(request.url).searchParams, can(shop.role, 'comebacks', 'write'));
  const { from, to, technicianId } = filters;
  const mayRate = can(shop.role, 'technicianRates') && shop.role !== 'technician';
  await Promise.all([
    queryClient.infiniteQuery({ ...comebacksQuery(filters), staleTime: 'static' }),
    ...(shop.role === 'technician'
      ? []
      : [
          queryClient.query({ ...waitingQuery({ ...filters, status: undefined }), staleTime: 'static' }),
          technicianId
            ? queryClient.query({ ...technicianRatesQuery({ from, to }), staleTime: 'static' })
            : queryClient.query({ ...modelRatesQuery({ from, to }), staleTime: 'static' }),
        ]),
    ...(mayRate ? [queryClient.query({ ...technicianRatesQuery({}), staleTime: 'static' })] : []),
  ]);
  return null;
}

export function Component() {
  const [search, setSearch] = useSearchParams();
  const { can: may, isOwnOnly } = useCan();
  const formats = useFormats();
  const [looked, setLooked] = useState<Comeback | null>(null);
  const mayDecide = may('comebacks', 'write');
  const isOwn = isOwnOnly('comebacks');
  const status = statusOf(search, mayDecide);
  const filters = comebackFiltersOf(search, mayDecide);
  const {
    data: rows,
    hasNextPage,
    isFetchingNextPage,
    fetchNextPage,
  } = useSuspenseInfiniteQuery(comebacksQuery(filters));
  const columns = useMemo(
    () => comebackColumns({ formats, isOwn, onDecide: mayDecide ? setLooked : undefined }),
    [formats, isOwn, mayDecide],
  );
  const isNarrowed = status !== 'all' || filters.from !== undefined || filters.to !== undefined;

  return (
    <Page
      title="Comebacks"
      aside={isOwn ? 'of your own repairs' : 'by the day on which the first repair was done'}
      actions={
        <Button look="text" onClick={() => print()}>
          Print
        </Button>
      }
      finding={
        isOwn ? (
          <OwnSentence count={rows.length} hasMore={hasNextPage} isNarrowed={isNarrowed} formats={formats} />
        ) : (
          <ComebacksSentence filters={filters} formats={formats} />
        )
      }
    >
      <Sheet>
        <ComebackFilterBar
          filters={filters}
          status={status}
          hasTechnicians={may('technicianRates') && !isOwn}
          onChange={(changes) => setSearch(withChanges(search, changes), { preventScrollReset: true })}
        />
        <DataTable
          caption="Machines that came back for the same trouble"
          rows={rows}
          columns={columns}
          rowId={(row) => row.id}
          spreadsheet="comebacks"
          more={{ hasMore: hasNextPage, isLoading: isFetchingNextPage, onMore: () => void fetchNextPage() }}
          empty={
            status === 'suggested' ? (
              <EmptyState title="Nothing waits to be looked at.">
                <Link className="underline" to={paths.comebacks({ status: 'all' })}>
                  Show those that were decided
                </Link>
              </EmptyState>
            ) : (
              <EmptyState title="No comeback is like that.">
                A machine that comes in again for the same trouble within the shop’s window appears here by
                itself.
              </EmptyState>
            )
          }
        />
        <p className="mt-2">
          <HowComputed anchor="comeback-reasons">
            How a comeback is told, and what its reasons mean
          </HowComputed>
        </p>
      </Sheet>
      {looked && <DecideDialog comeback={looked} onClose={() => setLooked(null)} formats={formats} />}
    </Page>
  );
}
