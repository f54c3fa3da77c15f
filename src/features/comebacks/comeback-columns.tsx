import { Link } from 'react-router';
import type { Comeback } from '../../../shared/comebacks';
import { Button } from '../../components/ui/button';
import type { Column } from '../../components/ui/data-table';
import type { Formats } from '../../lib/format';
import { paths } from '../../paths';
import { reasonWords, statusWords } from './comeback-words';

type Options = {
  formats: Formats;
  /** A person's own, read as help: no money, no judging. */
  isOwn: boolean;
  onDecide: ((comeback: Comeback) => void) | undefined;
};

/** Comebacks as the server sorts them, the newest first work first. */
export function comebackColumns({ formats, isOwn, onDecide }: Options): Column<Comeback>[] {
  const columns: (Column<Comeback> | false)[] = [
    {
      id: 'back',
      header: isOwn ? 'What cured it, or tried to' : 'Came back',
      value: ({ repairNumber }) => repairNumber,
      cell: ({ repairId, repairNumber, returnedOn }) => (
        <RepairCell id={repairId} number={repairNumber} on={formats.day(returnedOn)} />
      ),
      isRowHeader: true,
      className: 'whitespace-nowrap',
    },
    {
      id: 'returnedOn',
      header: 'Came back on',
      value: ({ returnedOn }) => returnedOn,
      only: 'spreadsheet',
    },
    {
      id: 'first',
      header: isOwn ? 'What you did first' : 'First repair',
      value: ({ firstRepairNumber }) => firstRepairNumber,
      cell: ({ firstRepairId, firstRepairNumber, firstWorkOn }) => (
        <RepairCell id={firstRepairId} number={firstRepairNumber} on={formats.day(firstWorkOn)} />
      ),
      className: 'whitespace-nowrap',
    },
    {
      id: 'machine',
      header: 'Machine',
      value: ({ model, unit }) => [model?.name, unit.name].filter(Boolean).join(' '),
      cell: ({ model, unit }) => (
        <>
          <Link to={paths.unit(unit.id)}>{unit.name}</Link>
          {model && <span className="block text-sm whitespace-nowrap text-dim">{model.name}</span>}
        </>
      ),
    },
    {
      id: 'after',
      header: 'After',
      value: ({ days }) => days,
      cell: ({ days, hours }) => (
        <>
          {days === 0 ? 'before it left' : formats.days(days)}
          {hours !== null && (
            <span className="block text-sm text-dim">{formats.hours(hours)} of running</span>
          )}
        </>
      ),
      className: 'whitespace-nowrap',
    },
    {
      id: 'seems',
      header: 'What it seems, and why',
      value: ({ reason, suggestedReason }) => reasonWords(reason ?? suggestedReason),
      cell: (row) => <Seems row={row} />,
      className: 'min-w-[17rem]',
    },
    { id: 'evidence', header: 'Evidence', value: ({ evidence }) => evidence, only: 'spreadsheet' },
    !isOwn && {
      id: 'cost',
      header: 'Cost',
      value: ({ costCents }) => costCents / 100,
      cell: ({ costCents }) => formats.wholeMoney(costCents),
      align: 'right',
    },
    {
      id: 'status',
      header: isOwn ? 'Looked at' : 'Decided',
      value: statusWords,
      cell: (row) => <Decided row={row} formats={formats} onDecide={onDecide} />,
      // On a phone the hand finds it without scrolling the rows.
      className: `desk:pl-3 desk:min-w-[9rem] ${onDecide ? 'max-desk:sticky max-desk:right-0 max-desk:bg-sheet max-desk:pl-2' : ''}`,
    },
  ];
  return columns.flatMap((column) => (column ? [{ ...column, isSortable: false }] : []));
}

function RepairCell({ id, number, on }: { id: string; number: string; on: string }) {
  return (
    <>
      <Link to={paths.repair(id)}>{number}</Link>
      <span className="block text-sm text-dim">{on}</span>
    </>
  );
}

function Seems({ row }: { row: Comeback }) {
  const { reason, suggestedReason, component, evidence, note } = row;
  return (
    <>
      {reasonWords(reason ?? suggestedReason)}
      {component && `: ${component.name}`}
      {/* Once a person has said why, the computation's reasoning only supports it. */}
      <span className="block text-sm text-dim">{evidence}</span>
      {note && <span className="block text-sm">“{note}”</span>}
    </>
  );
}

type DecidedProps = { row: Comeback; formats: Formats; onDecide: ((comeback: Comeback) => void) | undefined };

function Decided({ row, formats, onDecide }: DecidedProps) {
  const isWaiting = row.status === 'suggested';
  return (
    <>
      {onDecide && isWaiting ? (
        <Button onClick={() => onDecide(row)} aria-label={`Look at ${row.repairNumber}`}>
          Look at it
        </Button>
      ) : (
        <span className={isWaiting ? 'text-brass' : ''}>{statusWords(row)}</span>
      )}
      {row.decidedBy && !isWaiting && (
        <span className="block text-sm text-dim">
          {row.decidedBy}, {formats.instant(row.decidedAt)}
        </span>
      )}
      {onDecide && !isWaiting && (
        <Button
          look="text"
          className="text-sm"
          onClick={() => onDecide(row)}
          aria-label={`Change ${row.repairNumber}`}
        >
          Change
        </Button>
      )}
    </>
  );
}
