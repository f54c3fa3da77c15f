import { lazy, useMemo } from 'react';
import type { UnitEvent, UnitWhole } from '../../../shared/machines';
import { ChartFrame } from '../../components/charts/chart-frame';
import type { TimelineShape } from '../../components/charts/timeline-mark';
import type { TimelineStop } from '../../components/charts/unit-timeline';
import { DataTable } from '../../components/ui/data-table';
import { Segmented } from '../../components/ui/segmented';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';
import { eventColumns } from './event-columns';
import { dayTicks, hourTicks } from './timeline-ticks';
import { byDays, byHours, type TimelinePoint } from './timeline-points';
import { shortWorkOf, tipOf } from './unit-words';

const UnitTimeline = lazy(() =>
  import('../../components/charts/unit-timeline').then((m) => ({ default: m.UnitTimeline })),
);

type Props = {
  unit: UnitWhole;
  clock: 'hours' | 'days' | undefined;
  onClock: (clock: 'hours' | 'days') => void;
  formats: Formats;
};

const SHAPES: Record<TimelineShape, string> = {
  circle: 'repair',
  diamond: 'repair for the same trouble again',
  square: 'reading in the register',
  small: 'setup, counter sale or internal work',
};

/** The machine's life along one line. */
export function UnitPicture({ unit, clock, onClock, formats }: Props) {
  const hours = useMemo(() => byHours(unit.events), [unit.events]);
  const days = useMemo(() => byDays(unit.events, unit.inServiceOn), [unit.events, unit.inServiceOn]);
  const columns = useMemo(() => eventColumns(formats), [formats]);
  const isHours = hours !== null && clock !== 'days';
  const { points, start, end } = isHours ? hours : days;
  const stops = points
    .map((point, index) => stopOf(point, index, isHours, formats))
    .sort((a, b) => a.at - b.at);
  const used = [...new Set(stops.map(({ shape }) => shape))];
  const isAnyHollow = stops.some(({ isHollow }) => isHollow);

  return (
    <ChartFrame
      title={isHours ? 'Along its running hours' : 'Along the calendar'}
      sub={
        points.some(({ isRestart }) => isRestart)
          ? 'two strokes: the hour meter began anew there, so the hours before and after cannot be added up'
          : isHours
            ? 'each mark is a visit or a reading; over it, what was replaced'
            : `each mark is a visit or a reading; over it, what was replaced${hours === null ? ' · too few hour readings for an axis of hours' : ''}`
      }
      actions={
        hours !== null && (
          <Segmented
            label="Along what"
            value={isHours ? 'hours' : 'days'}
            onChange={onClock}
            options={[
              { value: 'hours', label: 'hours' },
              { value: 'days', label: 'calendar' },
            ]}
          />
        )
      }
      how="meter-hours"
      heightPx={180}
      chart={
        <UnitTimeline
          stops={stops}
          start={start}
          end={end}
          ticks={isHours ? hourTicks(end, formats) : dayTicks(start, end)}
          shapes={[
            ...used.map((shape) => ({ shape, isHollow: false, text: SHAPES[shape] })),
            ...(isAnyHollow
              ? [{ shape: 'circle' as const, isHollow: true, text: 'hollow: no reading that can be used' }]
              : []),
          ]}
          label={`Timeline of ${unit.name}`}
        />
      }
      table={
        <DataTable
          caption={`Visits and readings of ${unit.name}`}
          rows={unit.events}
          columns={columns}
          rowId={idOf}
          spreadsheet={`machine-${unit.name}`}
        />
      }
    />
  );
}

export const idOf = (event: UnitEvent): string => event.repair?.id ?? `${event.kind}-${event.on}`;

function stopOf(point: TimelinePoint, index: number, isHours: boolean, formats: Formats): TimelineStop {
  const { event, at, isPlaced, isRestart } = point;
  const tip = tipOf(point, formats);
  return {
    id: `${index}-${idOf(event)}`,
    at,
    shape: shapeOf(event),
    isHollow: event.meterFault !== null || (isHours && !isPlaced),
    isBreak: isRestart,
    name: shortWorkOf(event),
    href: event.repair ? paths.repair(event.repair.id) : null,
    label: [tip.heading, ...tip.lines].join('; '),
    tip,
  };
}

function shapeOf({ kind, repair, isComebackOf }: UnitEvent): TimelineShape {
  if (kind === 'register') return 'square';
  if (repair?.ticketType !== 'repair') return 'small';
  return isComebackOf ? 'diamond' : 'circle';
}
