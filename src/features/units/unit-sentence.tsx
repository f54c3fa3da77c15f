import type { UnitWhole } from '../../../shared/machines';
import { Finding, Over, Strong } from '../../components/ui/finding';
import type { Formats } from '../../lib/format';

type Props = { unit: UnitWhole; formats: Formats };

/** What machine it is, how often it was here, and for the same trouble how often. */
export function UnitSentence({ unit, formats }: Props) {
  const { model, repairs, lastRepairOn, lastMeterHours, isRegistered, events } = unit;
  const what = model ? `This ${model.name}` : 'This machine, whose model is not known,';
  if (repairs === 0) {
    return (
      <Finding>
        {what} has not been here{isRegistered ? '; it stands in the register' : ''}.
      </Finding>
    );
  }
  const visits = events.filter(({ kind }) => kind === 'repair');
  const again = visits.filter(({ isComebackOf }) => isComebackOf !== null).length;
  const first = visits[0]?.on ?? null;
  return (
    <Finding>
      {what} has been here <Strong>{repairs === 1 ? 'once' : formats.counted(repairs, 'time')}</Strong>
      {repairs > 1 && first ? ` since ${formats.day(first)}, last` : ','} on {formats.day(lastRepairOn)}
      {lastMeterHours !== null && `; its meter was last read at ${formats.hours(lastMeterHours)}`}
      {again > 0 && (
        <>
          . <Over>{again === 1 ? 'Once' : formats.counted(again, 'time')}</Over> it was back for the same
          trouble
        </>
      )}
      .
    </Finding>
  );
}
