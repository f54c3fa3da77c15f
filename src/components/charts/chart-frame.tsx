import { Suspense, useState, type ReactNode } from 'react';
import type { HelpAnchor } from '../../help-anchors';
import { AsTable } from '../ui/as-table';
import { PanelBoundary } from '../ui/error-panel';
import { HowComputed } from '../ui/how-computed';
import { Sheet } from '../ui/sheet';
import { Skeleton } from '../ui/skeleton';

type Props = {
  title: string;
  /** How to read the picture, in place of a legend. */
  sub?: ReactNode;
  /** The picture: a lazily loaded chart. */
  chart: ReactNode;
  /** The same figures as a `DataTable`. */
  table: ReactNode;
  how: HelpAnchor;
  /** Kept free while the chart's code loads, so that nothing jumps. */
  heightPx?: number;
  /** More links in the foot, and pickers in the head. */
  foot?: ReactNode;
  actions?: ReactNode;
  className?: string;
};

/** A picture with its title, its table twin, and the way to its method. */
export function ChartFrame(props: Props) {
  const { title, sub, chart, table, how, heightPx = 320, foot, actions, className } = props;
  const [isTable, setTable] = useState(false);
  return (
    <Sheet title={title} sub={sub} {...(className ? { className } : {})} actions={actions}>
      <PanelBoundary>
        {isTable ? (
          table
        ) : (
          <figure style={{ minHeight: heightPx }} aria-label={title}>
            <Suspense
              fallback={
                <div style={{ height: heightPx }} className="flex items-end">
                  <Skeleton className="h-full w-full" />
                </div>
              }
            >
              {chart}
            </Suspense>
          </figure>
        )}
      </PanelBoundary>
      <div className="mt-1 -mb-2 flex flex-wrap items-center gap-x-4 gap-y-1.5" data-screen-only>
        <AsTable isTable={isTable} onToggle={() => setTable(!isTable)} />
        {foot}
        <HowComputed anchor={how} />
      </div>
    </Sheet>
  );
}
