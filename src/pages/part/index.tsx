import { useSuspenseQueries, useSuspenseQuery } from '@tanstack/react-query';
import { Link, redirect, useParams, useSearchParams, type LoaderFunctionArgs } from 'react-router';
import { Button } from '../../components/ui/button';
import { Caution } from '../../components/ui/caution';
import { RouteError } from '../../components/ui/error-panel';
import { Page } from '../../components/ui/page';
import { Segmented } from '../../components/ui/segmented';
import { modelsQuery, nameOf } from '../../features/models/queries';
import { Basis } from '../../features/parts/basis';
import { FitPicture } from '../../features/parts/fit-picture';
import { filtersOf, readAddress, withChoice, type LifeAddress } from '../../features/parts/life-filters';
import { LifePicture } from '../../features/parts/life-picture';
import { LifeSentence } from '../../features/parts/life-sentence';
import { isLineDrawn } from '../../features/parts/life-words';
import { Numbers } from '../../features/parts/numbers';
import { familiesQuery, partLifeQuery } from '../../features/parts/queries';
import { ScopePicker } from '../../features/parts/scope-picker';
import { TakesWithIt } from '../../features/parts/takes-with-it';
import type { PartLife } from '../../../shared/parts';
import { agesOn } from '../../lib/ages';
import { queryClient } from '../../lib/query-client';
import { can, sessionQuery, useFormats } from '../../lib/session';
import { paths } from '../../paths';

export const ErrorBoundary = RouteError;

/** More curves than this cannot be told apart. */
const MOST_APART = 4;

/** The part numbers that get a curve of their own, those with most failures first. */
function numbersApart(address: LifeAddress, life: PartLife): string[] {
  if (!address.isApart || address.partNumbers !== undefined) return [];
  return [...life.numbers]
    .filter(({ lives }) => lives > 0)
    .sort((a, b) => b.failures - a.failures || b.lives - a.lives)
    .slice(0, MOST_APART)
    .map(({ part }) => part.name);
}

/** The life of one part number, on the clock of the whole. */
const numberQuery = (component: string, address: LifeAddress, life: PartLife, partNumbers: string) =>
  partLifeQuery(component, { ...filtersOf(address), clock: life.clock, partNumbers });

export async function loader({ params, request }: LoaderFunctionArgs) {
  const component = params['component'] ?? '';
  const address = readAddress(new URL(request.url).searchParams);
  const { shop } = await queryClient.query({ ...sessionQuery, staleTime: 'static' });
  // The counter reads records, not figures.
  if (!can(shop.role, 'analysis')) throw redirect(paths.repairs({ componentId: component }));
  const pickers = [modelsQuery(), familiesQuery] as const;
  const [life] = await Promise.all([
    queryClient.query({ ...partLifeQuery(component, filtersOf(address)), staleTime: 'static' }),
    queryClient.query({ ...pickers[0], staleTime: 'static' }),
    queryClient.query({ ...pickers[1], staleTime: 'static' }),
  ]);
  await Promise.all(
    numbersApart(address, life).map((number) =>
      queryClient.query({ ...numberQuery(component, address, life, number), staleTime: 'static' }),
    ),
  );
  return null;
}

export function Component() {
  const component = useParams()['component'] ?? '';
  const [search, setSearch] = useSearchParams();
  const address = readAddress(search);
  const formats = useFormats();
  const { data: life } = useSuspenseQuery(partLifeQuery(component, filtersOf(address)));
  const { data: models } = useSuspenseQuery(modelsQuery());
  const { data: families } = useSuspenseQuery(familiesQuery);
  const numbers = numbersApart(address, life);
  const apart = useSuspenseQueries({
    queries: numbers.map((number) => numberQuery(component, address, life, number)),
  }).map(({ data }, index) => ({ name: numbers[index] ?? '', life: data }));
  const ages = agesOn(life.clock, formats);
  const choose = (changes: Record<string, string | undefined>) =>
    setSearch(withChoice(search, changes), { preventScrollReset: true });
  const linkTo = (changes: Record<string, string | undefined>) =>
    `?${withChoice(search, changes).toString()}`;

  return (
    <Page
      title={life.component.name}
      pickers={
        <>
          <ScopePicker
            models={models.data.map((model) => ({ id: model.id, name: nameOf(model) }))}
            families={families.data}
            modelId={address.modelId}
            familyId={address.familyId}
            onChange={({ model, family }) => choose({ model, family, only: undefined })}
          />
          <Segmented
            label="Age in"
            value={life.clock}
            onChange={(clock) => choose({ clock })}
            options={[
              { value: 'hours', label: 'hours' },
              { value: 'days', label: 'months' },
            ]}
          />
        </>
      }
      aside={life.system === 'unassigned' ? undefined : life.system}
      actions={
        <Button look="text" onClick={() => print()}>
          Print
        </Button>
      }
      finding={
        <LifeSentence
          life={life}
          formats={formats}
          ages={ages}
          reasons={address.reasons ?? 'known'}
          isOneNumber={address.partNumbers !== undefined}
          isAssumed={address.assumedOriginal === 'true'}
          assumeLink={linkTo({ original: 'true' })}
        />
      }
    >
      <div className="grid items-start gap-6 desk:grid-cols-[minmax(0,1fr)_344px]">
        <div className="flex min-w-0 flex-col gap-6">
          {life.lives > 0 && (
            <LifePicture
              life={life}
              apart={apart}
              formats={formats}
              ages={ages}
              foot={
                <Link
                  to={paths.repairs({ componentId: life.component.id, modelId: address.modelId })}
                  className="inline-flex min-h-11 items-center text-sm desk:min-h-9"
                >
                  the repairs behind it
                </Link>
              }
            />
          )}
          {isLineDrawn(life) && apart.length === 0 && (
            <FitPicture life={life} formats={formats} ages={ages} />
          )}
        </div>
        <div className="flex min-w-0 flex-col gap-6">
          <Numbers
            numbers={life.numbers}
            only={address.partNumbers}
            linkTo={(only) => linkTo({ only })}
            formats={formats}
            ages={ages}
          />
          <TakesWithIt life={life} formats={formats} />
          <Basis life={life} address={address} choose={choose} formats={formats} />
        </div>
      </div>
      <Caution />
    </Page>
  );
}
