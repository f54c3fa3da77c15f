import { useSuspenseQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { useSearchParams, type LoaderFunctionArgs } from 'react-router';
import { Button } from '../../components/ui/button';
import { Caution } from '../../components/ui/caution';
import { DataTable } from '../../components/ui/data-table';
import { RouteError } from '../../components/ui/error-panel';
import { HowComputed } from '../../components/ui/how-computed';
import { Page } from '../../components/ui/page';
import { Select } from '../../components/ui/select';
import { Sheet } from '../../components/ui/sheet';
import { CascadePicture } from '../../features/cascades/cascade-picture';
import { CascadesSentence } from '../../features/cascades/cascades-sentence';
import { CaseFiles } from '../../features/cascades/case-files';
import { pairColumns } from '../../features/cascades/pair-columns';
import { findingsQuery, findingSummaryQuery } from '../../features/cascades/queries';
import { modelsQuery, nameOf } from '../../features/models/queries';
import { queryClient } from '../../lib/query-client';
import { useFormats, useSession } from '../../lib/session';

export const ErrorBoundary = RouteError;

const modelOf = (search: URLSearchParams) => search.get('model') ?? undefined;

export async function loader({ request }: LoaderFunctionArgs) {
  const modelId = modelOf(new URL(request.url).searchParams);
  await Promise.all([
    queryClient.query({ ...findingsQuery(modelId), staleTime: 'static' }),
    queryClient.query({ ...findingSummaryQuery, staleTime: 'static' }),
    queryClient.query({ ...modelsQuery(), staleTime: 'static' }),
  ]);
  return null;
}

export function Component() {
  const [search, setSearch] = useSearchParams();
  const modelId = modelOf(search);
  const formats = useFormats();
  const { windowDays } = useSession().shop;
  const { data: findings } = useSuspenseQuery(findingsQuery(modelId));
  const { data: summary } = useSuspenseQuery(findingSummaryQuery);
  const { data: models } = useSuspenseQuery(modelsQuery());
  const chosen = models.data.find(({ id }) => id === modelId);
  const cascades = findings.data.filter(({ kind }) => kind === 'cascade');
  const together = findings.data.filter(({ kind }) => kind === 'together');
  const caseFiles = summary.caseFiles.filter(({ model }) => modelId === undefined || model.id === modelId);
  const columns = useMemo(
    () => ({ cascade: pairColumns(formats, 'cascade'), together: pairColumns(formats, 'together') }),
    [formats],
  );
  const rows = (
    <DataTable
      caption="What takes what with it"
      rows={cascades}
      columns={columns.cascade}
      rowId={({ id }) => id}
      initialSort={{ id: 'both', desc: true }}
      spreadsheet="cascades"
    />
  );

  return (
    <Page
      title="Cascades"
      pickers={
        <Select
          look="picker"
          label="Model"
          value={modelId ?? ''}
          onChange={(model) => setSearch(model ? { model } : {}, { preventScrollReset: true })}
          options={[
            { value: '', label: 'all models' },
            // Models with findings first: they are what one comes for.
            ...[...models.data]
              .sort((a, b) => Number(b.findings > 0) - Number(a.findings > 0))
              .map((model) => ({ value: model.id, label: nameOf(model) })),
          ]}
        />
      }
      aside={summary.asOf ? `records up to ${formats.day(summary.asOf)}` : undefined}
      actions={
        <Button look="text" onClick={() => print()}>
          Print
        </Button>
      }
      finding={
        <CascadesSentence
          findings={findings.data}
          summary={summary}
          modelName={chosen && nameOf(chosen)}
          windowDays={windowDays}
          formats={formats}
        />
      }
    >
      {cascades.length > 0 && (
        <>
          <CascadePicture
            cascades={cascades}
            pairsExamined={summary.pairsExamined}
            table={rows}
            formats={formats}
          />
          <Sheet
            title="The pairs, one a model"
            sub={`back: within ${windowDays} days, counted where these are over; with the limits for so many`}
            actions={<HowComputed anchor="cascade" />}
          >
            {rows}
          </Sheet>
        </>
      )}
      {together.length > 0 && (
        <Sheet
          title={`Pairs that only fail together (${formats.count(together.length)})`}
          sub="Oftener near each other than their ages explain; which takes which is not shown."
          actions={<HowComputed anchor="together">what is that</HowComputed>}
        >
          <DataTable
            caption="Pairs that only fail together"
            rows={together}
            columns={columns.together}
            rowId={({ id }) => id}
            initialSort={{ id: 'both', desc: true }}
            spreadsheet="fail-together"
          />
        </Sheet>
      )}
      {caseFiles.length > 0 && <CaseFiles caseFiles={caseFiles} formats={formats} />}
      {findings.data.length > 0 && <Caution />}
    </Page>
  );
}
