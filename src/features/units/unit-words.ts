import type { UnitEvent } from '../../../shared/machines';
import type { Tip } from '../../components/charts/tip';
import type { Formats } from '../../lib/format';
import { faultWords, TICKET_WORDS, workWords } from '../../lib/record-words';
import type { TimelinePoint } from './timeline-points';

/** What was replaced, else what was done, in a few words. */
export function workOf({ replaced, workDone }: UnitEvent): string {
  const fitted = [...new Set(replaced.map(({ component }) => component.name))];
  if (fitted.length > 0) return fitted.join(', ');
  return workDone
    .map(({ component, workDone: work }) => [component?.name, workWords(work)].filter(Boolean).join(' '))
    .join(', ');
}

/** What stands over its mark: the first thing done, and how many more. */
export function shortWorkOf(event: UnitEvent): string {
  const failed = event.replaced.filter(({ reason }) => reason === 'failed' || reason === 'damage');
  const names = [
    ...new Set((failed.length > 0 ? failed : event.replaced).map(({ component }) => component.name)),
  ];
  const [first] = names;
  if (first) return names.length > 1 ? `${first} +${names.length - 1}` : first;
  const [work] = event.workDone;
  return work ? [work.component?.name, workWords(work.workDone)].filter(Boolean).join(' ') : '';
}

export function titleOf({ kind, repair }: UnitEvent): string {
  if (kind === 'register' || !repair) return 'Reading in the register';
  const ticket = TICKET_WORDS[repair.ticketType as keyof typeof TICKET_WORDS];
  return repair.ticketType === 'repair' ? `Repair ${repair.number}` : `${repair.number}, ${ticket}`;
}

/** "412.6 h", and what is to be said of that reading. */
export function readingOf({ meterHours, cumulativeHours, meterFault }: UnitEvent, formats: Formats): string {
  if (meterHours === null) return 'hours not read';
  if (meterFault) return `${formats.hours(meterHours)}, not used: ${faultWords(meterFault)}`;
  if (cumulativeHours !== null && Math.abs(cumulativeHours - meterHours) > 0.05)
    return `${formats.hours(meterHours)} on a newer meter, ${formats.hours(cumulativeHours)} in all`;
  return formats.hours(meterHours);
}

export function tipOf({ event, isRestart }: TimelinePoint, formats: Formats): Tip {
  const { isComebackOf, complaint } = event;
  return {
    heading: `${titleOf(event)}, ${formats.day(event.on)}`,
    lines: [
      readingOf(event, formats),
      isRestart ? 'The meter began anew before this; what ran in between is not known.' : '',
      complaint ? `“${complaint.length > 90 ? `${complaint.slice(0, 88)} …` : complaint}”` : '',
      workOf(event),
      isComebackOf ? `came back for the same trouble as ${isComebackOf.name}` : '',
    ].filter((line) => line !== ''),
  };
}
