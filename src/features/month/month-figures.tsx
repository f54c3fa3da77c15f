import type { ReactNode } from 'react';
import type { MonthReview } from '../../../shared/reports';
import type { HelpAnchor } from '../../help-anchors';
import { HowComputed } from '../../components/ui/how-computed';
import { Sheet } from '../../components/ui/sheet';
import type { Formats } from '../../lib/format';
import { monthInWords } from './month-words';

type Props = { review: MonthReview; formats: Formats };

/** Cured at the first visit, and what coming back costs. */
export function MonthFigures({ review, formats }: Props) {
  const { firstVisitCure: cure, costCents, costOfComebacks } = review;
  if (review.month === null) return null;
  const month = monthInWords(review, formats);
  const isOpen = review.rows.some((row) => row.month === review.month && row.maturing);
  return (
    <Sheet title={`The work of ${month}`}>
      <dl className="flex flex-col gap-3">
        <Figure label="Cured at the first visit" how="first-visit-cure">
          {cure.of === 0 ? (
            'No trouble of this month is old enough to judge.'
          ) : (
            <>
              <strong className="font-heading">{formats.percent(cure.cured / cure.of)}</strong> of{' '}
              {formats.counted(cure.of, 'trouble')} ({formats.percentRange(cure.interval)})
            </>
          )}
        </Figure>
        <Figure label="What its comebacks cost" how="comeback-cost">
          {costOfComebacks === 0 ? (
            'None to count.'
          ) : (
            <>
              <strong className="font-heading">{formats.wholeMoney(costCents)}</strong>
              {isOpen && ' so far'} for {formats.counted(costOfComebacks, 'comeback')}: labor given away,
              parts not paid, pick-up. Not a booked figure.
            </>
          )}
        </Figure>
      </dl>
    </Sheet>
  );
}

function Figure({ label, how, children }: { label: string; how: HelpAnchor; children: ReactNode }) {
  return (
    <div>
      <dt className="text-sm text-dim">{label}</dt>
      <dd>
        {children} <HowComputed anchor={how}>how</HowComputed>
      </dd>
    </div>
  );
}

/** "by the door this month: 12, from March–May work" */
export function byTheDoor({ byTheDoor: door }: MonthReview, formats: Formats): string {
  if (door.count === 0) return 'none came back by the door this month';
  const from = door.fromMonth && formats.monthName(door.fromMonth);
  const to = door.toMonth && formats.monthName(door.toMonth);
  const work = from && to ? `, from ${from === to ? from : `${from}–${to}`} work` : '';
  return `by the door this month: ${formats.count(door.count)}${work}`;
}
