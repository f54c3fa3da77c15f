import type { ReactNode } from 'react';
import type { RepairWhole } from '../../../shared/repairs';
import { HowComputed } from '../../components/ui/how-computed';
import { Sheet } from '../../components/ui/sheet';
import type { Formats } from '../../lib/format';
import { faultWords } from '../../lib/record-words';

type Props = { repair: RepairWhole; formats: Formats };

/** The sums, and what to know before its figures are relied on. */
export function RepairFacts({ repair, formats }: Props) {
  const { partsAmountCents, laborAmountCents, laborHours, totalCents } = repair;
  const other = totalCents - partsAmountCents - (laborAmountCents ?? 0);
  return (
    <Sheet title="Billed">
      <dl className="grid grid-cols-[1fr_auto] gap-x-4 gap-y-1 text-table">
        <Sum name="Parts" value={formats.money(partsAmountCents)} />
        <Sum
          name={laborHours === null ? 'Labor' : `Labor, ${formats.hours(laborHours)}`}
          value={formats.money(laborAmountCents)}
        />
        {other !== 0 && laborAmountCents !== null && (
          <Sum name="Fees and other lines" value={formats.money(other)} />
        )}
        <Sum name="Total" value={formats.money(totalCents)} isStrong />
      </dl>
      <Remarks repair={repair} formats={formats} />
    </Sheet>
  );
}

function Sum({ name, value, isStrong = false }: { name: string; value: string; isStrong?: boolean }) {
  const look = isStrong ? 'border-t border-rule pt-1 font-heading' : '';
  return (
    <>
      <dt className={isStrong ? look : 'text-dim'}>{name}</dt>
      <dd className={`text-right ${look}`}>{value}</dd>
    </>
  );
}

function Remarks({ repair, formats }: Props) {
  const remarks: [string, ReactNode][] = [];
  if (repair.meterFault && repair.meterHours !== null) {
    remarks.push([
      'meter',
      <>
        The reading of {formats.hours(repair.meterHours)} is not used: {faultWords(repair.meterFault)}.{' '}
        <HowComputed anchor="meter-hours">Which readings count</HowComputed>
      </>,
    ]);
  }
  if (!repair.unit && repair.machineText) {
    remarks.push([
      'machine',
      `The record says “${repair.machineText}” of the machine; that does not tell which one it was.`,
    ]);
  }
  if (repair.engine) remarks.push(['engine', `Engine: ${repair.engine}`]);
  if (repair.location) remarks.push(['location', `Done at ${repair.location}`]);
  const last = repair.versions.at(-1);
  if (last) {
    remarks.push([
      'versions',
      `The record was brought in anew ${repair.versions.length === 1 ? 'once' : `${formats.count(repair.versions.length)} times`}, last on ${formats.instant(last.replacedAt)}; what it said before is kept.`,
    ]);
  }
  if (remarks.length === 0) return null;
  return (
    <ul className="mt-4 flex flex-col gap-2 border-t border-rule pt-3 text-sm text-dim">
      {remarks.map(([key, words]) => (
        <li key={key}>
          <p>{words}</p>
        </li>
      ))}
    </ul>
  );
}
