import { useQuery, useSuspenseQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { useSearchParams, type LoaderFunctionArgs } from 'react-router';
import { Button } from '../../components/ui/button';
import { DataTable } from '../../components/ui/data-table';
import { RouteError } from '../../components/ui/error-panel';
import { Page } from '../../components/ui/page';
import { SearchBox } from '../../components/ui/search-box';
import { Sheet } from '../../components/ui/sheet';
import { modelColumns } from '../../features/models/model-columns';
import { ModelsPicture } from '../../features/models/models-picture';
import { ModelsSentence } from '../../features/models/models-sentence';
import { withLimits } from '../../features/models/model-words';
import { modelsQuery, rateByModelQuery } from '../../features/models/queries';
import { queryClient } from '../../lib/query-client';
import { can, sessionQuery, useCan, useFormats, useSession } from '../../lib/session';

export const ErrorBoundary = RouteError;

const wordOf = (search: URLSearchParams) => search.get('q') ?? undefined;

export async function loader({ request }: LoaderFunctionArgs) {
  const { shop } = await queryClient.query({ ...sessionQuery, staleTime: 'static' });
  await Promise.all([
    queryClient.query({
      ...modelsQuery({ q: wordOf(new URL(request.url).searchParams) }),
      staleTime: 'static',
    }),
    can(shop.role, 'rates') ? queryClient.query({ ...rateByModelQuery, staleTime: 'static' }) : null,
  ]);
  return null;
}

export function Component() {
  const [search, setSearch] = useSearchParams();
  const q = wordOf(search);
  const { can: may } = useCan();
  const formats = useFormats();
  const { shop } = useSession();
  const { data: models } = useSuspenseQuery(modelsQuery({ q }));
  // The counter sees no rates; for everybody else the loader has fetched them.
  const answer = useQuery({ ...rateByModelQuery, enabled: may('rates') }).data?.data;
  const rates = useMemo(() => (answer && answer.length > 0 ? withLimits(answer) : null), [answer]);
  const columns = useMemo(() => modelColumns(rates, formats), [rates, formats]);

  return (
    <Page
      title="Models"
      aside={`${formats.counted(models.data.length, 'model')}${models.nextCursor === null ? '' : ' shown of more'}`}
      actions={
        <Button look="text" onClick={() => print()}>
          Print
        </Button>
      }
      finding={q ? undefined : <ModelsSentence models={models.data} rates={rates} formats={formats} />}
    >
      {rates && !q && models.data.length > 0 && (
        <ModelsPicture rates={rates} windowDays={shop.windowDays} formats={formats} />
      )}
      <Sheet
        title="Models"
        sub="failures: parts replaced because they failed"
        actions={
          <SearchBox
            label="Find a model"
            value={q ?? ''}
            onSearch={(word) => setSearch(word ? { q: word } : {}, { preventScrollReset: true })}
          />
        }
      >
        <DataTable
          caption="Models"
          rows={models.data}
          columns={columns}
          rowId={(row) => row.id}
          sortKey="sort"
          initialSort={{ id: 'failures', desc: true }}
          spreadsheet="models"
          empty={
            q ? (
              <p className="text-dim">No model is called “{q}”.</p>
            ) : (
              <p className="text-dim">Models come with the closed repairs.</p>
            )
          }
        />
      </Sheet>
    </Page>
  );
}
