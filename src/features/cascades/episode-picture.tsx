import { lazy } from 'react';
import type { FindingWhole } from '../../../shared/findings';
import { ChartFrame } from '../../components/charts/chart-frame';
import { Button } from '../../components/ui/button';
import { DataTable } from '../../components/ui/data-table';
import { Segmented } from '../../components/ui/segmented';
import type { Formats } from '../../lib/format';
import { caseColumns } from './case-columns';
import { drawable, episodeRow, episodeScale, evenly, usualClock, type EpisodeClock } from './episode-rows';
import { lowered } from './finding-words';

const EpisodeChart = lazy(() =>
  import('../../components/charts/episode-chart').then((module) => ({ default: module.EpisodeChart })),
);

const SHOWN_FIRST = 14;
const ROW_PX = 24;

type Props = {
  finding: FindingWhole;
  clock: EpisodeClock | undefined;
  isAll: boolean;
  choose: (changes: { clock?: EpisodeClock; all?: boolean }) => void;
  formats: Formats;
};

/** The troubles behind a pair, a line a machine, from its first visit on. */
export function EpisodePicture({ finding, clock: asked, isAll, choose, formats }: Props) {
  const { cases, causal, resultant } = finding;
  const clock = asked ?? usualClock(cases);
  const known = drawable(cases, clock);
  const shown = isAll ? known : evenly(known, SHOWN_FIRST);
  const atOnce = cases.filter(({ visits }) => visits.length === 1).length;
  const withoutHours = cases.length - atOnce - known.length;
  const title = 'The troubles behind it';
  return (
    <ChartFrame
      title={title}
      sub={[
        `one line is one machine, in ${clock === 'hours' ? 'running hours' : 'days'} since its first visit; it ends where the trouble ended`,
        atOnce > 0 ? `${formats.counted(atOnce, 'trouble')} took one visit and have no line` : '',
        withoutHours > 0 ? `${formats.count(withoutHours)} have no hours` : '',
      ]
        .filter(Boolean)
        .join(' · ')}
      how="cascade"
      heightPx={shown.length * ROW_PX + 60}
      actions={
        <Segmented
          label="Since the first visit in"
          value={clock}
          onChange={(value) => choose({ clock: value })}
          options={[
            { value: 'hours', label: 'hours' },
            { value: 'days', label: 'days' },
          ]}
        />
      }
      chart={
        shown.length === 0 ? (
          <p className="text-dim">
            {withoutHours > 0
              ? 'None has hours at every visit; choose days.'
              : 'Each took one visit: there is nothing to draw.'}
          </p>
        ) : (
          <EpisodeChart
            rows={shown.map((episode, index) =>
              episodeRow(episode, index, { clock, causal, resultant, formats }),
            )}
            {...episodeScale(shown, clock)}
            shapes={[
              { shape: 'dot', text: `${lowered(resultant)} replaced` },
              { shape: 'diamond', text: `${lowered(causal)} replaced` },
              { shape: 'both', text: 'both at one visit' },
            ]}
            label={title}
          />
        )
      }
      table={
        <DataTable
          caption={title}
          rows={cases}
          columns={caseColumns(formats)}
          rowId={(row) => `${row.unit.id} ${row.visits[0]?.repair.id ?? ''}`}
          spreadsheet="troubles"
        />
      }
      foot={
        known.length > SHOWN_FIRST && (
          <span className="inline-flex items-center gap-x-3 text-sm text-dim">
            {isAll
              ? `all ${formats.count(known.length)} shown`
              : `${formats.count(shown.length)} of ${formats.count(known.length)} shown, evenly picked`}
            <Button look="text" className="text-sm" onClick={() => choose({ all: !isAll })}>
              {isAll ? 'fewer' : 'show all'}
            </Button>
          </span>
        )
      }
    />
  );
}
