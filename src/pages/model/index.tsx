import { useSuspenseQuery } from '@tanstack/react-query';
import { Link, useParams, type LoaderFunctionArgs } from 'react-router';
import { Button } from '../../components/ui/button';
import { Caution } from '../../components/ui/caution';
import { RouteError } from '../../components/ui/error-panel';
import { HowComputed } from '../../components/ui/how-computed';
import { Page } from '../../components/ui/page';
import { Sheet } from '../../components/ui/sheet';
import { Failures, Lives } from '../../features/models/failures';
import { ModelSentence } from '../../features/models/model-sentence';
import { OftenFailsWith } from '../../features/models/often-fails-with';
import { modelQuery, nameOf } from '../../features/models/queries';
import { Pace, RecurrencePicture } from '../../features/models/recurrence';
import { queryClient } from '../../lib/query-client';
import { useCan, useFormats } from '../../lib/session';
import { paths } from '../../paths';

export const ErrorBoundary = RouteError;

export async function loader({ params }: LoaderFunctionArgs) {
  await queryClient.query({ ...modelQuery(params['id'] ?? ''), staleTime: 'static' });
  return null;
}

export function Component() {
  const id = useParams()['id'] ?? '';
  const { data: model } = useSuspenseQuery(modelQuery(id));
  const formats = useFormats();
  const { can } = useCan();
  const kinds = [model.productType?.replace('_', ' '), ...model.families.map(({ name }) => `family ${name}`)];

  return (
    <Page
      title={nameOf(model)}
      aside={[...kinds, formats.counted(model.units, 'machine'), formats.counted(model.repairs, 'repair')]
        .filter(Boolean)
        .join(' · ')}
      actions={
        <>
          <Link to={paths.repairs({ modelId: id })}>Its repairs</Link>
          {can('analysis') && <Link to={paths.cascades({ model: id })}>Its cascades</Link>}
          <Button look="text" onClick={() => print()}>
            Print
          </Button>
        </>
      }
      finding={<ModelSentence model={model} formats={formats} />}
    >
      <div className="grid items-start gap-6 desk:grid-cols-[minmax(0,1fr)_330px]">
        <div className="flex min-w-0 flex-col gap-6">
          <Failures model={model} formats={formats} />
          <RecurrencePicture recurrence={model.recurrence} formats={formats} />
        </div>
        <div className="flex min-w-0 flex-col gap-6">
          <OftenFailsWith model={model} formats={formats} />
          {model.comebackRate !== null && (
            <Sheet title="Came back" actions={<HowComputed anchor="comeback-rate">how</HowComputed>}>
              <p>
                <strong className="font-heading">{formats.percent(model.comebackRate)}</strong> of{' '}
                {formats.counted(model.comebackSize, 'repair')} (
                {formats.percentRange(model.comebackInterval)}): {formats.count(model.comebackCount)} came
                back.
              </p>
            </Sheet>
          )}
          <Pace recurrence={model.recurrence} formats={formats} />
        </div>
      </div>
      <Sheet
        title="How long they last"
        sub="half gone by: the age by which half have failed, with its limits"
        actions={<HowComputed anchor="one-in-ten">how</HowComputed>}
      >
        <Lives model={model} formats={formats} />
      </Sheet>
      <Caution />
    </Page>
  );
}
