import type { ReactElement } from 'react';
import { ResponsiveContainer } from 'recharts';

type Props = { heightPx: number; children: ReactElement };

/** Gives a Recharts chart its room: the full width, a fixed height. */
export function ChartBox({ heightPx, children }: Props) {
  return (
    <div className="chart" style={{ height: heightPx }}>
      <ResponsiveContainer width="100%" height="100%" initialDimension={{ width: 640, height: heightPx }}>
        {children}
      </ResponsiveContainer>
    </div>
  );
}
