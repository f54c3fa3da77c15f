import type { PartLife } from '../../../shared/parts';
import { Held, Over, Strong } from '../../components/ui/finding';
import type { Formats } from '../../lib/format';
import { timesAsOften } from './life-words';

type Props = { comparison: NonNullable<PartLife['comparison']>; formats: Formats };

/** Whether the newer number holds longer: only what the limits allow. */
export function NumberComparison({ comparison, formats }: Props) {
  const { ratio, interval, newer, older } = comparison;
  const limits = `${formats.range(interval, 2)} times`;
  const isBelow = interval.upper !== null && interval.upper < 1;
  const isAbove = interval.lower !== null && interval.lower > 1;
  if (!isBelow && !isAbove) {
    return (
      <>
        {' '}
        Whether the newer number, {newer.name}, holds longer than {older.name}{' '}
        <Strong>cannot be told yet</Strong> ({limits} as often).
      </>
    );
  }
  const Word = isBelow ? Held : Over;
  return (
    <>
      {' '}
      The newer number, {newer.name}, fails <Word>{timesAsOften(ratio)}</Word> at the same age ({limits}).
    </>
  );
}
