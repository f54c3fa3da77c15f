import { COMPONENTS, componentNamed } from './components';
import { dateOf, dayOf } from './calendar';
import { openVisit, replace, technicianFor, work } from './history';
import type { History } from './history';
import { inspect } from './inspection';
import { serviceWords } from './phrases';
import type { Season } from './season';

/** When people bring a machine in for its yearly service: [month, day, spread in days, weight]. */
const SERVICE_TIMES: Record<Season, readonly (readonly [string, number, number])[]> = {
  mowing: [
    ['02-20', 70, 62],
    ['11-05', 95, 24],
    ['06-20', 60, 14],
  ],
  snow: [
    ['09-05', 80, 80],
    ['03-10', 40, 20],
  ],
  allYear: [
    ['02-25', 80, 60],
    ['07-01', 120, 40],
  ],
};

export function nextServiceDay({ random, unit }: History, year: number): number {
  const [start, spreadDays] = random.weighted(
    SERVICE_TIMES[unit.model.season].map(
      ([date, spread, weight]) => [[date, spread] as const, weight] as const,
    ),
  );
  return dayOf(`${String(year)}-${start}`) + random.whole(0, spreadDays);
}

export const yearOf = (day: number): number => Number(dateOf(day).slice(0, 4));

/** The yearly service: wear items as maintenance, and whatever is seen worn. */
export function tellService(history: History, day: number): void {
  const { random, unit } = history;
  const visit = openVisit(history, day, {
    kind: 'service',
    subject: componentNamed('Engine oil'),
    words: serviceWords(random),
    payType: 'customer',
    technician: technicianFor(history, day),
  });
  for (const { name, builds, servicedShare } of COMPONENTS) {
    if (servicedShare && builds.includes(unit.model.build) && random.chance(servicedShare * 0.74)) {
      replace(history, visit, name, 'maintenance');
    }
  }
  if (visit.lines.length === 0) work(visit, 'Air filter', 'cleaned');
  inspect(history, visit, '');
}
