import { useSuspenseQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { Link, useParams, type LoaderFunctionArgs } from 'react-router';
import { Button } from '../../components/ui/button';
import { Caution } from '../../components/ui/caution';
import { DataTable } from '../../components/ui/data-table';
import { RouteError } from '../../components/ui/error-panel';
import { Page } from '../../components/ui/page';
import { Sheet } from '../../components/ui/sheet';
import { lineColumns } from '../../features/repairs/line-columns';
import { repairQuery } from '../../features/repairs/queries';
import { RepairFacts } from '../../features/repairs/repair-facts';
import { RepairFinding } from '../../features/repairs/repair-finding';
import { RepairLinks } from '../../features/repairs/repair-links';
import { RepairStory } from '../../features/repairs/repair-story';
import { isNearDanger } from '../../features/repairs/safety';
import { queryClient } from '../../lib/query-client';
import { useCan, useFormats, useSession } from '../../lib/session';
import { paths } from '../../paths';

export const ErrorBoundary = RouteError;

export async function loader({ params }: LoaderFunctionArgs) {
  await queryClient.query({ ...repairQuery(params['id'] ?? ''), staleTime: 'static' });
  return null;
}

export function Component() {
  const { id = '' } = useParams();
  const { data: repair } = useSuspenseQuery(repairQuery(id));
  const { shop } = useSession();
  const { can } = useCan();
  const formats = useFormats();
  const mayAnalyze = can('analysis');
  const columns = useMemo(() => lineColumns(formats, mayAnalyze), [formats, mayAnalyze]);

  return (
    <Page
      title={`Repair ${repair.number}`}
      aside={`done ${formats.day(repair.workOn)}${repair.closedOn === repair.workOn ? '' : ` · closed ${formats.day(repair.closedOn)}`}`}
      actions={
        <>
          {repair.unit && <Link to={paths.unit(repair.unit.id)}>The machine’s history</Link>}
          <Button look="text" onClick={() => print()}>
            Print
          </Button>
        </>
      }
      finding={<RepairFinding repair={repair} windowDays={shop.windowDays} formats={formats} />}
    >
      <div className="grid items-start gap-6 desk:grid-cols-[minmax(0,1fr)_292px]">
        <div className="flex min-w-0 flex-col gap-6">
          <RepairStory repair={repair} formats={formats} />
          {isNearDanger(repair) && <Caution />}
          <Sheet title="Lines" sub="under each: where it is known from">
            <DataTable
              caption={`Lines of repair ${repair.number}`}
              rows={repair.lines}
              columns={columns}
              rowId={(line) => line.id}
              spreadsheet={`repair-${repair.number}`}
              empty={
                <p className="text-dim">The record has no lines: no part, no labor, no work is listed.</p>
              }
            />
          </Sheet>
        </div>
        <div className="flex min-w-0 flex-col gap-6">
          <RepairLinks repair={repair} formats={formats} />
          <RepairFacts repair={repair} formats={formats} />
        </div>
      </div>
    </Page>
  );
}
