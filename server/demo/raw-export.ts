import { dateOf, dayOf } from './calendar';
import { toCsv } from './csv';
import { createFleet } from './fleet';
import { longTailModels, spellMaker, spellModel } from './long-tail';
import { centsText, doorRateCents, priceThenCents } from './money';
import { spellingOf } from './people';
import { createRandom } from './random';
import type { Random } from './random';
import { writtenHours } from './recording';
import type { SimulationOptions } from './simulate-millrace';
import { numberVisits } from './tickets';
import type { Numbered } from './tickets';
import { tellUnit } from './unit-story';
import type { Visit } from './visits';
import { createWorld } from './world';
import type { World } from './world';

export const RAW_COLUMNS = [
  'Ticket #',
  'Date In',
  'Date Closed',
  'Cust',
  'Phone',
  'Make',
  'Model',
  'S/N',
  'Hrs',
  'Tech',
  'Notes',
  'Part #',
  'Desc',
  'Qty',
  'Ext',
  'Labor',
] as const;
type RawRow = Record<(typeof RAW_COLUMNS)[number], string>;

const YEARS = 2;
const MODEL_COUNT = 290;
const MACHINES = 2250;
const FIRST_TICKET = 7000;

/** m/d/yyyy, without leading zeros. */
function usDate(day: number): string {
  const [year, month, dayOfMonth] = dateOf(day).split('-').map(Number);
  return `${String(month)}/${String(dayOfMonth)}/${String(year)}`;
}

const notesOf = ({ words, lines }: Visit): string => {
  const work = lines.flatMap((line) =>
    line.kind === 'work' ? [`${line.component} ${line.work.replace('_', ' ')}`] : [],
  );
  return [words.complaint, words.cause, words.correction, words.notes, ...work]
    .filter((text) => text !== '')
    .map((text) => text.replace(/\.$/, ''))
    .join('. ')
    .toUpperCase();
};

function ticketRows({ visit }: Numbered, at: number, world: World, random: Random): RawRow[] {
  const { unit } = visit;
  const yearsAgo = world.yearsAgo(visit.closedDay);
  const laborHours = Math.max(
    0.3,
    visit.lines.reduce((sum, line) => sum + line.laborHours, 0),
  );
  const ticket: RawRow = {
    'Ticket #': String(FIRST_TICKET + at),
    'Date In': usDate(visit.openedDay),
    'Date Closed': usDate(visit.closedDay),
    Cust: random.chance(0.4) ? unit.customer.name.toUpperCase() : unit.customer.name,
    Phone: random.chance(0.25) ? '' : unit.customer.phone,
    Make: spellMaker(random, unit.model.maker),
    Model: spellModel(random, unit.model.model),
    'S/N': unit.serial,
    Hrs: random.chance(0.4) ? '' : writtenHours(random, visit.meterHours),
    Tech: spellingOf(visit.technician, random),
    Notes: notesOf(visit),
    'Part #': '',
    Desc: '',
    Qty: '',
    Ext: '',
    Labor: '',
  };
  const parts = visit.lines.flatMap((line): Partial<RawRow>[] => {
    if (line.kind !== 'part') return [];
    const { component, number, listCents } = line.part;
    return [
      {
        'Part #': number,
        Desc: random.pick(component.descriptions),
        Qty: String(component.quantity),
        Ext: centsText(priceThenCents(listCents, yearsAgo) * component.quantity),
      },
    ];
  });
  const labor = centsText(Math.round(laborHours * doorRateCents(yearsAgo)));
  const lines = parts.length > 0 ? parts : [{}];
  return lines.map((part, index) => ({ ...ticket, ...part, Labor: index === 0 ? labor : '' }));
}

/**
 * What a shop with a long tail of models gets out of its old program: other headings, m/d/yyyy, notes in capitals, no
 * component, no reason, half the machines without a serial. One row per part, about 3,000 tickets.
 */
export function rawExport({ asOf, seed = 4600 }: SimulationOptions): string {
  const asOfDay = dayOf(asOf);
  const firstDay = asOfDay - Math.round(YEARS * 365.25);
  const world = createWorld(seed, asOfDay, firstDay);
  const models = longTailModels(createRandom(seed, 'long tail'), MODEL_COUNT);
  const plan = { models, registered: MACHINES, walkIns: 0, firstDay, asOfDay, plateGone: 0.5 };
  const fleet = createFleet(createRandom(seed, 'raw fleet'), plan);
  const visits = fleet
    .flatMap((unit) => tellUnit(unit, world).visits)
    .filter(({ closedDay }) => closedDay <= asOfDay);
  const random = createRandom(seed, 'raw tickets');
  const rows = numberVisits(visits).flatMap((numbered, at) => ticketRows(numbered, at, world, random));
  return toCsv(rows, RAW_COLUMNS);
}
