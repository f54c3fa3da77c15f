import { useSuspenseQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { Link, useParams, useSearchParams, type LoaderFunctionArgs } from 'react-router';
import { Button } from '../../components/ui/button';
import { DataTable } from '../../components/ui/data-table';
import { RouteError } from '../../components/ui/error-panel';
import { Page } from '../../components/ui/page';
import { Sheet } from '../../components/ui/sheet';
import { EmptyState } from '../../components/ui/states';
import { eventColumns } from '../../features/units/event-columns';
import { fittedColumns } from '../../features/units/fitted-columns';
import { unitQuery } from '../../features/units/queries';
import { UnitFacts } from '../../features/units/unit-facts';
import { idOf, UnitPicture } from '../../features/units/unit-picture';
import { UnitSentence } from '../../features/units/unit-sentence';
import { queryClient } from '../../lib/query-client';
import { withChanges } from '../../lib/search-params';
import { useCan, useFormats } from '../../lib/session';
import { paths } from '../../paths';

export const ErrorBoundary = RouteError;

export async function loader({ params }: LoaderFunctionArgs) {
  await queryClient.query({ ...unitQuery(params['id'] ?? ''), staleTime: 'static' });
  return null;
}

export function Component() {
  const { id = '' } = useParams();
  const [search, setSearch] = useSearchParams();
  const { data: unit } = useSuspenseQuery(unitQuery(id));
  const { can } = useCan();
  const formats = useFormats();
  const mayAnalyze = can('analysis');
  const fitted = useMemo(() => fittedColumns(formats, mayAnalyze), [formats, mayAnalyze]);
  const visitColumns = useMemo(() => eventColumns(formats), [formats]);
  const visits = useMemo(() => unit.events.filter(({ kind }) => kind === 'repair').reverse(), [unit.events]);
  const clock = search.get('clock');

  return (
    <Page
      title={unit.name}
      aside={
        unit.model &&
        (can('records') ? <Link to={paths.model(unit.model.id)}>{unit.model.name}</Link> : unit.model.name)
      }
      actions={
        <Button look="text" onClick={() => print()}>
          Print
        </Button>
      }
      finding={<UnitSentence unit={unit} formats={formats} />}
    >
      {unit.events.length > 0 && (
        <UnitPicture
          unit={unit}
          clock={clock === 'hours' || clock === 'days' ? clock : undefined}
          onClock={(next) =>
            setSearch(withChanges(search, { clock: next }), { replace: true, preventScrollReset: true })
          }
          formats={formats}
        />
      )}
      <div className="grid items-start gap-6 desk:grid-cols-[minmax(0,1fr)_292px]">
        <Sheet title="In it now" sub="what this shop fitted last; what the maker fitted is not on record">
          <DataTable
            caption="What is in it now, as far as this shop fitted it"
            rows={unit.fitted}
            columns={fitted}
            rowId={({ component }) => component.id}
            empty={<p className="text-dim">No part of it was fitted here, as far as the records tell.</p>}
          />
        </Sheet>
        <UnitFacts unit={unit} formats={formats} />
      </div>
      <Sheet title="Its repairs">
        <DataTable
          caption={`Repairs of ${unit.name}, the newest first`}
          rows={visits}
          columns={visitColumns}
          rowId={idOf}
          empty={<EmptyState title="It has not been repaired here." />}
        />
      </Sheet>
    </Page>
  );
}
