import { useSuspenseInfiniteQuery, useSuspenseQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { Link, useSearchParams, type LoaderFunctionArgs } from 'react-router';
import { DataTable } from '../../components/ui/data-table';
import { RouteError } from '../../components/ui/error-panel';
import { Page } from '../../components/ui/page';
import { Sheet } from '../../components/ui/sheet';
import { EmptyState } from '../../components/ui/states';
import { modelsQuery, nameOf } from '../../features/models/queries';
import { repairsQuery } from '../../features/repairs/queries';
import { repairColumns } from '../../features/repairs/repair-columns';
import { RepairFilterBar } from '../../features/repairs/repair-filter-bar';
import { hasFilters, repairFiltersOf } from '../../features/repairs/repair-filters';
import { RepairsSentence } from '../../features/repairs/repairs-sentence';
import { queryClient } from '../../lib/query-client';
import { withChanges } from '../../lib/search-params';
import { useCan, useFormats } from '../../lib/session';
import { paths } from '../../paths';

export const ErrorBoundary = RouteError;

export async function loader({ request }: LoaderFunctionArgs) {
  const filters = repairFiltersOf(new URL(request.url).searchParams);
  await Promise.all([
    queryClient.infiniteQuery({ ...repairsQuery(filters), staleTime: 'static' }),
    queryClient.query({ ...modelsQuery(), staleTime: 'static' }),
  ]);
  return null;
}

export function Component() {
  const [search, setSearch] = useSearchParams();
  const filters = repairFiltersOf(search);
  const {
    data: rows,
    hasNextPage,
    isFetchingNextPage,
    fetchNextPage,
  } = useSuspenseInfiniteQuery(repairsQuery(filters));
  const { data: models } = useSuspenseQuery(modelsQuery());
  const { can } = useCan();
  const formats = useFormats();
  const columns = useMemo(() => repairColumns(formats), [formats]);

  return (
    <Page
      title="Repairs"
      finding={<RepairsSentence rows={rows} hasMore={hasNextPage} filters={filters} formats={formats} />}
    >
      <Sheet>
        <RepairFilterBar
          filters={filters}
          models={models.data.map((model) => ({ id: model.id, name: nameOf(model) }))}
          onChange={(changes) => setSearch(withChanges(search, changes), { preventScrollReset: true })}
        />
        <DataTable
          caption="Repairs, the newest work first"
          rows={rows}
          columns={columns}
          rowId={(row) => row.id}
          spreadsheet="repairs"
          more={{ hasMore: hasNextPage, isLoading: isFetchingNextPage, onMore: () => void fetchNextPage() }}
          empty={
            hasFilters(filters) ? (
              <EmptyState title="No repair is like that.">
                Try fewer words, or{' '}
                <Link className="underline" to={paths.repairs()}>
                  show all repairs
                </Link>
                .
              </EmptyState>
            ) : (
              <EmptyState title="No repairs yet.">
                They come from files of closed repairs
                {can('imports', 'write') && (
                  <>
                    :{' '}
                    <Link className="underline" to={paths.imports()}>
                      bring one in
                    </Link>
                  </>
                )}
                .
              </EmptyState>
            )
          }
        />
      </Sheet>
    </Page>
  );
}
