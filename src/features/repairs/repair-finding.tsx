import { Link } from 'react-router';
import type { RepairWhole } from '../../../shared/repairs';
import { Finding, Held, Over, Strong } from '../../components/ui/finding';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';
import { TICKET_WORDS } from '../../lib/record-words';

type Props = { repair: RepairWhole; windowDays: number; formats: Formats };

/** Whether the work held. */
export function RepairFinding({ repair, windowDays, formats }: Props) {
  const [back] = repair.cameBackAs;
  if (back) {
    return (
      <Finding>
        It <Over>came back after {formats.days(back.days)}</Over> for the same trouble, as{' '}
        <Link to={paths.repair(back.id)}>{back.number}</Link>
        {repair.cameBackAs.length > 1 &&
          `, and ${formats.counted(repair.cameBackAs.length - 1, 'more time')}`}
        .
      </Finding>
    );
  }
  if (repair.ticketType !== 'repair') {
    return (
      <Finding>
        This was <Strong>{TICKET_WORDS[repair.ticketType]}</Strong>: it enters no rate of return.
      </Finding>
    );
  }
  if (!repair.unit) {
    return (
      <Finding>
        Its machine is <Strong>not identified</Strong>, so nobody can tell whether it came back. It counts as
        work done, not in rates of return.
      </Finding>
    );
  }
  if (repair.asOf === null) {
    return (
      <Finding>The records have not been read together yet: nothing is known of what came back.</Finding>
    );
  }
  const days = daysBetween(repair.workOn, repair.asOf);
  if (days < windowDays) {
    return (
      <Finding>
        It has <Strong>not come back so far</Strong>; of its {formats.days(windowDays)}{' '}
        {formats.days(Math.max(0, days))} are over.
      </Finding>
    );
  }
  return (
    <Finding>
      The work <Held>held</Held>: it did not come back for the same trouble within {formats.days(windowDays)}.
    </Finding>
  );
}

const DAY_MS = 86_400_000;
const daysBetween = (from: string, to: string): number =>
  Math.round((Date.parse(to) - Date.parse(from)) / DAY_MS);
