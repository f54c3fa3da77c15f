import { useSuspenseQuery } from '@tanstack/react-query';
import { Link, useParams, type LoaderFunctionArgs } from 'react-router';
import { RouteError } from '../../components/ui/error-panel';
import { Page } from '../../components/ui/page';
import { Sheet } from '../../components/ui/sheet';
import { isUnderWay, KINDS, nameOf } from '../../features/imports/import-words';
import { NextLinks, Outcome } from '../../features/imports/outcome';
import { Progress } from '../../features/imports/progress';
import { importQuery } from '../../features/imports/queries';
import { Rejected } from '../../features/imports/rejected';
import { Undo } from '../../features/imports/undo';
import { useNews } from '../../features/imports/use-news';
import { queryClient } from '../../lib/query-client';
import { useCan, useFormats } from '../../lib/session';
import { paths } from '../../paths';

export const ErrorBoundary = RouteError;

export async function loader({ params }: LoaderFunctionArgs) {
  await queryClient.query({ ...importQuery(params['id'] ?? ''), staleTime: 'static' });
  return null;
}

export function Component() {
  const { id = '' } = useParams();
  const { data: state } = useSuspenseQuery(importQuery(id));
  const { can } = useCan();
  const formats = useFormats();
  useNews(state);
  const isOver = !isUnderWay(state);

  return (
    <Page
      title={nameOf(state)}
      aside={`${KINDS[state.kind].file}${state.isDryRun ? ', only tried' : ''} · ${formats.instant(state.createdAt)}${state.startedBy ? ` · ${state.startedBy}` : ''}`}
      actions={<Link to={paths.imports()}>All imports</Link>}
    >
      <Progress state={state} formats={formats} />
      {isOver && state.status !== 'failed' && (
        <Sheet title={state.status === 'undone' ? 'What had happened' : 'What happened'}>
          <Outcome
            state={state}
            formats={formats}
            links={<NextLinks state={state} mayRate={can('rates')} />}
          />
        </Sheet>
      )}
      {isOver && state.rejected > 0 && (
        <Sheet title="Rejected" sub="a record goes in whole or not at all">
          <Rejected importState={state} />
        </Sheet>
      )}
      {state.status === 'done' && !state.isDryRun && can('imports', 'write') && <Undo state={state} />}
    </Page>
  );
}
