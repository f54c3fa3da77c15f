import type { ReactNode } from 'react';
import { Link } from 'react-router';
import type { RepairWhole } from '../../../shared/repairs';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';
import { PAY_WORDS } from '../../lib/record-words';

type Props = { repair: RepairWhole; formats: Formats };

/** Complaint, cause and correction read on from one to the next, with the days between them. */
export function RepairStory({ repair, formats }: Props) {
  const { complaint, cause, correction, notes, openedOn, workOn, pickedUpOn } = repair;
  const who = repair.technicians.map(({ name }) => name).join(' and ') || repair.technicianText;
  return (
    <div className="max-w-[40rem] text-[1.0625rem]/7 [&_q]:font-finding">
      <p>
        {openedOn ? (
          <>
            On <Day on={openedOn} formats={formats} /> <Machine repair={repair} /> came in
          </>
        ) : (
          <>
            <Machine repair={repair} isFirst /> came in, on what day is not written,
          </>
        )}
        {repair.meterHours === null ? ', hours not read' : ` at ${formats.hours(repair.meterHours)}`}
        {complaint ? <>: {said(complaint)}</> : '; no complaint was written.'}{' '}
        {cause ? <>What was found: {said(cause)}</> : 'What was found is not written.'}{' '}
        {openedOn === workOn ? (
          'The same day'
        ) : (
          <>
            By <Day on={workOn} formats={formats} />
          </>
        )}{' '}
        {who ?? 'the shop'}{' '}
        {correction ? <>did this: {said(correction)}</> : 'was done; what, is not written.'}
        {pickedUpOn && (
          <>
            {' '}
            It was fetched on <Day on={pickedUpOn} formats={formats} />.
          </>
        )}
      </p>
      {notes && <p className="mt-3">Also noted: {said(notes)}</p>}
      {(repair.customer ?? repair.payType) && (
        <p className="mt-3 text-table text-dim">
          {[
            repair.customer &&
              `Customer: ${[repair.customer.name ?? repair.customer.ref, repair.customer.phone].filter(Boolean).join(', ')}`,
            repair.payType && PAY_WORDS[repair.payType],
          ]
            .filter(Boolean)
            .join(' · ')}
        </p>
      )}
    </div>
  );
}

function Day({ on, formats }: { on: string; formats: Formats }) {
  return (
    <time dateTime={on} className="font-label whitespace-nowrap">
      {formats.day(on)}
    </time>
  );
}

/** The record's own words, untouched; a full stop follows where they have none. */
const said = (text: string): ReactNode => (
  <>
    <q className="whitespace-pre-line">{text.trim()}</q>
    {/[.!?…]$/.test(text.trim()) ? '' : '.'}
  </>
);

function Machine({ repair, isFirst = false }: { repair: RepairWhole; isFirst?: boolean }) {
  const { unit, model, machineText } = repair;
  const the = isFirst ? 'The' : 'the';
  if (unit) {
    return (
      <>
        {the} {model && `${model.name} `}
        <Link to={paths.unit(unit.id)}>{unit.name}</Link>
      </>
    );
  }
  const known = [model?.name, machineText].filter(Boolean).join(' ');
  if (known) return <>{`${isFirst ? 'A' : 'a'} ${known}`}</>;
  return <>{isFirst ? 'A machine that is not named' : 'a machine that is not named'}</>;
}
