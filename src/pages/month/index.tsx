import { useSuspenseQuery } from '@tanstack/react-query';
import { redirect, useRouteError, useSearchParams, type LoaderFunctionArgs } from 'react-router';
import { RouteError } from '../../components/ui/error-panel';
import { MonthPicker } from '../../components/ui/month-picker';
import { Page } from '../../components/ui/page';
import { Button } from '../../components/ui/button';
import { Drivers } from '../../features/month/drivers';
import { byTheDoor, MonthFigures } from '../../features/month/month-figures';
import { MonthPicture } from '../../features/month/month-picture';
import { MonthSentence } from '../../features/month/month-sentence';
import { NeedsDoing } from '../../features/month/needs-doing';
import { monthReviewQuery } from '../../features/month/queries';
import { TooFewTechnicians } from '../../features/month/too-few-technicians';
import { ApiError } from '../../lib/api';
import { queryClient } from '../../lib/query-client';
import { can, sessionQuery, useCan, useFormats } from '../../lib/session';
import { paths } from '../../paths';

const monthOf = (search: URLSearchParams) => search.get('month') ?? undefined;

export async function loader({ request }: LoaderFunctionArgs) {
  const { searchParams } = new URL(request.url);
  const session = await queryClient.query({ ...sessionQuery, staleTime: 'static' });
  // The counter has no figures to review: repairs are what they come for. Asking first would only be refused.
  if (!can(session.shop.role, 'rates')) throw redirect(paths.repairs());
  await queryClient.query({ ...monthReviewQuery(monthOf(searchParams)), staleTime: 'static' });
  return null;
}

export function ErrorBoundary() {
  const error = useRouteError();
  // Whose role has rates is refused only where the shop's rate would tell a technician another's.
  return error instanceof ApiError && error.status === 403 ? <TooFewTechnicians /> : <RouteError />;
}

export function Component() {
  const [search, setSearch] = useSearchParams();
  const { data: review } = useSuspenseQuery(monthReviewQuery(monthOf(search)));
  const formats = useFormats();
  const { can: may } = useCan();
  const months = review.rows.flatMap(({ month }) => (month === null ? [] : [month]));
  const isLatest = monthOf(search) === undefined;

  return (
    <Page
      title="This month"
      pickers={
        months.length > 0 && (
          <MonthPicker
            months={months}
            value={review.month ?? ''}
            format={formats.month}
            onChange={(month) => setSearch({ month }, { preventScrollReset: true })}
          />
        )
      }
      aside={
        review.repairsInAll > 0 &&
        `${isLatest && review.month !== null ? 'the latest that can be judged; ' : ''}${byTheDoor(review, formats)}`
      }
      actions={
        <Button look="text" onClick={() => print()}>
          Print
        </Button>
      }
      finding={<MonthSentence review={review} formats={formats} mayImport={may('imports', 'write')} />}
    >
      {review.rows.length > 0 && (
        <>
          {/* On a phone what needs doing comes before the picture; at the desk it stands beside it. */}
          <div className="grid items-start gap-6 desk:grid-cols-[minmax(0,1fr)_292px] desk:grid-rows-[auto_1fr]">
            <div className="min-w-0 desk:col-start-2 desk:row-start-1 print:order-last">
              <NeedsDoing todos={review.todos} />
            </div>
            <div className="min-w-0 desk:col-start-1 desk:row-span-2 desk:row-start-1">
              <MonthPicture review={review} formats={formats} />
            </div>
            <div className="min-w-0 desk:col-start-2 desk:row-start-2">
              <MonthFigures review={review} formats={formats} />
            </div>
          </div>
          <Drivers review={review} formats={formats} />
        </>
      )}
    </Page>
  );
}
