import { useSuspenseQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { useSearchParams, type LoaderFunctionArgs } from 'react-router';
import { Button } from '../../components/ui/button';
import { DataTable } from '../../components/ui/data-table';
import { RouteError } from '../../components/ui/error-panel';
import { HowComputed } from '../../components/ui/how-computed';
import { Page } from '../../components/ui/page';
import { SearchBox } from '../../components/ui/search-box';
import { Select } from '../../components/ui/select';
import { Sheet } from '../../components/ui/sheet';
import { modelsQuery, nameOf } from '../../features/models/queries';
import { componentColumns } from '../../features/parts/component-columns';
import { KindMeanings } from '../../features/parts/component-kinds';
import { ComponentsPicture } from '../../features/parts/components-picture';
import { ComponentsSentence } from '../../features/parts/components-sentence';
import { withChoice } from '../../features/parts/life-filters';
import { componentsQuery } from '../../features/parts/queries';
import { queryClient } from '../../lib/query-client';
import { useCan, useFormats } from '../../lib/session';

export const ErrorBoundary = RouteError;

const filtersOf = (search: URLSearchParams) => ({
  q: search.get('q') ?? undefined,
  modelId: search.get('model') ?? undefined,
});

export async function loader({ request }: LoaderFunctionArgs) {
  await Promise.all([
    queryClient.query({
      ...componentsQuery(filtersOf(new URL(request.url).searchParams)),
      staleTime: 'static',
    }),
    queryClient.query({ ...modelsQuery(), staleTime: 'static' }),
  ]);
  return null;
}

export function Component() {
  const [search, setSearch] = useSearchParams();
  const { q, modelId } = filtersOf(search);
  const system = search.get('system') ?? '';
  const formats = useFormats();
  const { can } = useCan();
  const { data: components } = useSuspenseQuery(componentsQuery({ q, modelId }));
  const { data: models } = useSuspenseQuery(modelsQuery());
  const mayChange = can('records', 'write');
  const systems = [...new Set(components.data.map((row) => row.system))].sort();
  const rows = useMemo(
    () => components.data.filter((row) => system === '' || row.system === system),
    [components.data, system],
  );
  const columns = useMemo(
    () => componentColumns({ rows, modelId, mayChange, formats }),
    [rows, modelId, mayChange, formats],
  );
  const choose = (changes: Record<string, string | undefined>) =>
    setSearch(withChoice(search, changes), { preventScrollReset: true });
  const table = (
    <DataTable
      caption="Components"
      rows={rows}
      columns={columns}
      rowId={({ id }) => id}
      sortKey="sort"
      initialSort={{ id: 'failures', desc: true }}
      spreadsheet="parts"
      empty={<p className="text-dim">{q ? `No component is called “${q}”.` : 'No component here.'}</p>}
    />
  );

  return (
    <Page
      title="Parts"
      pickers={
        <>
          <Select
            look="picker"
            label="Model"
            value={modelId ?? ''}
            onChange={(model) => choose({ model: model || undefined })}
            options={[
              { value: '', label: 'all models' },
              ...models.data.map((model) => ({ value: model.id, label: nameOf(model) })),
            ]}
          />
          <Select
            look="picker"
            label="System"
            value={system}
            onChange={(value) => choose({ system: value || undefined })}
            options={[
              { value: '', label: 'all systems' },
              ...systems.map((name) => ({ value: name, label: name })),
            ]}
          />
        </>
      }
      actions={
        <Button look="text" onClick={() => print()}>
          Print
        </Button>
      }
      finding={q ? undefined : <ComponentsSentence components={rows} modelId={modelId} formats={formats} />}
    >
      {!q && <ComponentsPicture components={rows} modelId={modelId} table={table} formats={formats} />}
      <Sheet
        title="Components"
        sub={`${formats.counted(rows.length, 'component')} · came back: of the jobs old enough to judge, with what so many can tell`}
        actions={
          <SearchBox
            label="Find a component"
            value={q ?? ''}
            onSearch={(word) => choose({ q: word || undefined })}
          />
        }
      >
        {table}
      </Sheet>
      <Sheet
        title="How it is replaced"
        sub={
          mayChange
            ? 'Said once for a component, it answers every line that gives no reason. What a line says itself always wins.'
            : 'The owner or the service manager says it once for a component; it answers every line that gives no reason.'
        }
        actions={<HowComputed anchor="unknown-reasons">why it matters</HowComputed>}
      >
        <KindMeanings />
      </Sheet>
    </Page>
  );
}
