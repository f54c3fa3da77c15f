import { useSuspenseInfiniteQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { DataTable } from '../../components/ui/data-table';
import { RouteError } from '../../components/ui/error-panel';
import { Page } from '../../components/ui/page';
import { Sheet } from '../../components/ui/sheet';
import { EmptyState } from '../../components/ui/states';
import { BringFile } from '../../features/imports/bring-file';
import { importColumns } from '../../features/imports/import-columns';
import { ImportsSentence } from '../../features/imports/imports-sentence';
import { importsQuery } from '../../features/imports/queries';
import { queryClient } from '../../lib/query-client';
import { useCan, useFormats } from '../../lib/session';

export const ErrorBoundary = RouteError;

export async function loader() {
  await queryClient.infiniteQuery({ ...importsQuery, staleTime: 'static' });
  return null;
}

export function Component() {
  const {
    data: rows,
    hasNextPage,
    isFetchingNextPage,
    fetchNextPage,
  } = useSuspenseInfiniteQuery(importsQuery);
  const { can } = useCan();
  const formats = useFormats();
  const columns = useMemo(() => importColumns(formats), [formats]);
  const mayBring = can('imports', 'write');

  return (
    <Page title="Imports" finding={<ImportsSentence rows={rows} formats={formats} />}>
      {mayBring && <BringFile />}
      <Sheet title="Brought in so far">
        <DataTable
          caption="Imports, the latest first"
          rows={rows}
          columns={columns}
          rowId={(state) => state.id}
          more={{ hasMore: hasNextPage, isLoading: isFetchingNextPage, onMore: () => void fetchNextPage() }}
          empty={
            <EmptyState title="Nothing has been brought in yet.">
              {mayBring
                ? 'Begin with a file of closed repairs: numbers, dates, machines and part numbers are enough for the first answers.'
                : 'The owner or the service manager brings files in; they appear here.'}
            </EmptyState>
          }
        />
      </Sheet>
    </Page>
  );
}
