import { foldText } from '../db/fold';
import { MOST_CENTS, type Fault } from './parse-cell';
import {
  LABOR_FIELDS,
  LINE_FIELDS,
  REPAIR_FIELDS,
  type LineField,
  type LineValues,
  type RepairField,
  type RepairValues,
} from './repair-fields';
import type { Staging } from './staging';

/** One row of a record: what it says of the repair, its line if it has one, and what is wrong with it. */
export type RepairRow = {
  row: number;
  repair: RepairValues;
  line: LineValues | undefined;
  faults: readonly Fault[];
};

/** What all rows of a file, or one repair of a batch, bring. */
export type Brought = { given: number; hasLines: boolean };

type Fragment = Brought & {
  /** Set aside from matching, since its record came before in the same batch. */
  isRepeated: boolean;
  ordinal: number;
  key: string | undefined;
  firstRow: number;
  lastRow: number;
  isEmpty: boolean;
  values: RepairValues;
  faults: number;
};

const MOST_FAULTS = 50;
const SHOWN_CHARACTERS = 200;
const MOST_LABOR_HOURS = 100_000;
/** Words that stand where a serial is not known. */
const NO_SERIAL = new Set([
  'n/a',
  'na',
  'none',
  'unknown',
  'unk',
  'no serial',
  'not available',
  'missing',
  'illegible',
  'unreadable',
  'tbd',
  '?',
  '-',
  '--',
  '.',
  '0',
  '00',
  '000',
  '0000',
  'x',
  'xx',
  'xxx',
  'xxxx',
]);
const DATE_ORDER: readonly RepairField[] = ['opened_on', 'ready_on', 'closed_on', 'picked_up_on'];

/** Gathers rows of the same repair that stand together and stages them; those that stand apart are joined in SQL. */
export class RepairStager {
  readonly #staging: Staging;
  #open: Fragment | undefined;
  #count = 0;

  constructor(staging: Staging) {
    this.#staging = staging;
  }

  /** Takes the row's values over. */
  add({ row, repair, line, faults }: RepairRow, brought: Brought): void {
    const key = keyOf(repair);
    const isSame = key !== undefined && this.#open?.key === key;
    if (!isSame) this.close();
    const open = (this.#open ??= this.#start(key, row, brought));
    open.lastRow = row;
    for (const fault of faults) this.#fault(open, row, fault);
    this.#join(open, row, repair);
    if (line) this.#stageLine(open, row, line);
  }

  /** Says of the record at hand that it came before, and is not to be joined with the first. */
  refuseRepeated(row: number): void {
    if (!this.#open) return;
    this.#open.isRepeated = true;
    this.#fault(this.#open, row, {
      column: 'repair_number',
      value: this.#open.values.repair_number ?? null,
      message: 'stands in this batch a second time',
      mend: 'Send each repair once, with all its lines.',
    });
  }

  /** Ends the repair at hand; its own rules are checked now. */
  close(): void {
    const open = this.#open;
    if (!open) return;
    this.#open = undefined;
    this.#check(open);
    this.#stageRepair(open);
  }

  #start(key: string | undefined, row: number, brought: Brought): Fragment {
    this.#count += 1;
    return {
      ...brought,
      ordinal: this.#count,
      key,
      firstRow: row,
      lastRow: row,
      isEmpty: true,
      values: {},
      faults: 0,
      isRepeated: false,
    };
  }

  #join(open: Fragment, row: number, repair: RepairValues): void {
    if (row === open.firstRow && open.isEmpty) {
      open.isEmpty = false;
      open.values = repair;
      return;
    }
    for (const field of REPAIR_FIELDS) {
      const value = repair[field] ?? null;
      if (value === null) continue;
      const held = open.values[field] ?? null;
      if (held === null) open.values[field] = value;
      else if (LABOR_FIELDS.includes(field)) open.values[field] = addLabor(field, held, value);
      else if (held !== value && foldText(held) !== foldText(value)) {
        this.#fault(open, row, {
          column: field,
          value,
          message: `differs from another row of this repair, which says “${held.slice(0, 60)}”`,
          mend: 'Give all rows of a repair the same value, or leave all but one empty.',
        });
      }
    }
  }

  #check(open: Fragment): void {
    const { values } = open;
    const row = open.firstRow;
    if (!values.repair_number && open.faults === 0)
      this.#fault(open, row, lacking('repair_number', 'Give the number of the work order.'));
    if (!values.closed_on && open.faults === 0)
      this.#fault(
        open,
        row,
        lacking('closed_on', 'Give the day the repair was closed; open work is not imported.'),
      );
    let earlier: { field: RepairField; day: string } | undefined;
    for (const field of DATE_ORDER) {
      const day = values[field];
      if (!day) continue;
      if (earlier && day < earlier.day) {
        this.#fault(open, row, {
          column: field,
          value: day,
          message: `lies before ${earlier.field}, ${earlier.day}`,
          mend: 'A machine is opened, ready, closed and picked up in this order: correct one of the days.',
        });
      }
      earlier = { field, day };
    }
    if (
      Math.abs(Number(values.labor_amount ?? 0)) > MOST_CENTS ||
      Math.abs(Number(values.labor_hours ?? 0)) > MOST_LABOR_HOURS
    ) {
      this.#fault(open, row, {
        column: 'labor_amount',
        value: null,
        message: 'labor of this repair adds up to more than can be',
        mend: 'Check the labor of its rows.',
      });
    }
  }

  #fault(open: Fragment, row: number, { column, value, message, mend }: Fault): void {
    open.faults += 1;
    if (open.faults > MOST_FAULTS) return;
    const shown = value?.replaceAll('\0', '\u2400').slice(0, SHOWN_CHARACTERS) ?? null;
    this.#staging.add('staged_faults', [open.ordinal, row, column, shown, message, mend]);
  }

  #stageRepair(open: Fragment): void {
    const { values } = open;
    const serial = fold(values.unit_serial);
    this.#staging.add('staged_repairs', [
      open.ordinal,
      open.ordinal,
      open.firstRow,
      open.lastRow,
      open.given,
      open.hasLines,
      ...REPAIR_FIELDS.map((field) => values[field] ?? null),
      fold(values.location) ?? '',
      open.isRepeated ? null : fold(values.repair_number),
      serial === null || NO_SERIAL.has(serial) ? null : serial,
      fold(values.unit_ref),
      customerKey(values),
      fold(values.maker) ?? '',
      fold(values.model),
    ]);
  }

  #stageLine(open: Fragment, row: number, line: LineValues): void {
    this.#staging.add('staged_lines', [
      open.ordinal,
      row,
      ...LINE_FIELDS.map((field) => (field === 'line_kind' ? lineKind(line) : (line[field] ?? null))),
      fold(line.part_number),
      fold(line.part_maker),
      fold(line.component),
    ]);
  }
}

const fold = (text: string | null | undefined): string | null => (text ? foldText(text) : null);
const lacking = (column: RepairField, mend: string): Fault => ({
  column,
  value: null,
  message: 'is missing',
  mend,
});

function keyOf(repair: RepairValues): string | undefined {
  return repair.repair_number
    ? `${fold(repair.location) ?? ''}\u001f${foldText(repair.repair_number)}`
    : undefined;
}

/** A customer without a number is told apart by name. */
function customerKey({ customer_ref, customer_name }: RepairValues): string | null {
  if (customer_ref) return foldText(customer_ref);
  return customer_name ? `name:${foldText(customer_name)}` : null;
}

function lineKind(line: LineValues): string {
  if (line.line_kind) return line.line_kind;
  if (line.part_number || line.part_description) return 'part';
  if (line.work_done) return 'work';
  const says = (field: LineField) => (line[field] ?? null) !== null;
  return says('component') || says('line_reason') || says('quantity') || says('part_cost') ? 'part' : 'fee';
}

function addLabor(field: RepairField, held: string, value: string): string {
  if (field === 'labor_op')
    return held.split('; ').includes(value) ? held : `${held}; ${value}`.slice(0, 2000);
  if (field === 'labor_amount') return String(Number(held) + Number(value));
  // Hundredths of an hour are what is kept, so that is where sums are rounded.
  return String(Math.round((Number(held) + Number(value)) * 100) / 100);
}
