import { useSuspenseQuery } from '@tanstack/react-query';
import { Link, useParams, useSearchParams, type LoaderFunctionArgs } from 'react-router';
import { Button } from '../../components/ui/button';
import { Caution } from '../../components/ui/caution';
import { RouteError } from '../../components/ui/error-panel';
import { Finding } from '../../components/ui/finding';
import { Page } from '../../components/ui/page';
import { Cases } from '../../features/cascades/cases';
import { EpisodePicture } from '../../features/cascades/episode-picture';
import { PairSentence } from '../../features/cascades/finding-sentence';
import { thing, whereOf } from '../../features/cascades/finding-words';
import { findingQuery } from '../../features/cascades/queries';
import { Strength } from '../../features/cascades/strength';
import { queryClient } from '../../lib/query-client';
import { useFormats, useSession } from '../../lib/session';
import { paths } from '../../paths';

export const ErrorBoundary = RouteError;

export async function loader({ params }: LoaderFunctionArgs) {
  await queryClient.query({ ...findingQuery(params['id'] ?? ''), staleTime: 'static' });
  return null;
}

export function Component() {
  const id = useParams()['id'] ?? '';
  const [search, setSearch] = useSearchParams();
  const { data: finding } = useSuspenseQuery(findingQuery(id));
  const formats = useFormats();
  const { windowDays } = useSession().shop;
  const clock = search.get('clock');
  const { causalComponent, resultantComponent, modelId } = finding;

  return (
    <Page
      title={`${finding.causal} ${finding.kind === 'cascade' ? '→' : 'and'} ${finding.resultant}`}
      aside={modelId ? <Link to={paths.model(modelId)}>{whereOf(finding)}</Link> : whereOf(finding)}
      actions={
        <>
          <Link to={paths.part(causalComponent.id, { model: modelId })}>
            How long {thing(finding.causal)} lasts
          </Link>
          <Link to={paths.part(resultantComponent.id, { model: modelId })}>
            How long {thing(finding.resultant)} lasts
          </Link>
          <Button look="text" onClick={() => print()}>
            Print
          </Button>
        </>
      }
      finding={
        <Finding>
          <PairSentence finding={finding} windowDays={windowDays} formats={formats} />
        </Finding>
      }
    >
      <EpisodePicture
        finding={finding}
        clock={clock === 'hours' || clock === 'days' ? clock : undefined}
        isAll={search.get('all') === '1'}
        choose={({ clock: nextClock, all }) =>
          setSearch(
            (old) => {
              const next = new URLSearchParams(old);
              if (nextClock) next.set('clock', nextClock);
              if (all === true) next.set('all', '1');
              if (all === false) next.delete('all');
              return next;
            },
            { preventScrollReset: true },
          )
        }
        formats={formats}
      />
      <Strength finding={finding} windowDays={windowDays} formats={formats} />
      <Cases finding={finding} formats={formats} />
      <Caution />
    </Page>
  );
}
