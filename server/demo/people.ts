import type { UseClass } from './makers';
import type { Random } from './random';

export interface Technician {
  name: string;
  /** How the name stands in the records; the first is the usual one. */
  spellings: readonly [string, ...string[]];
  location: Location;
  /** Share of first visits on which this person finds what really failed. */
  findsCause: number;
  /** Years before the demo's last day between which the person worked here. */
  yearsAgo: readonly [from: number, to: number];
}

export const LOCATIONS = ['Mill Street', 'Route 9'] as const;
export type Location = (typeof LOCATIONS)[number];

export const TECHNICIANS: readonly Technician[] = [
  {
    name: 'Dale Kettering',
    spellings: ['Dale K', 'DK'],
    location: 'Mill Street',
    findsCause: 0.8,
    yearsAgo: [99, 0],
  },
  {
    name: 'Ruth Ambry',
    spellings: ['Ruth', 'R. Ambry'],
    location: 'Mill Street',
    findsCause: 0.84,
    yearsAgo: [99, 0],
  },
  {
    name: 'Luis Ferrand',
    spellings: ['Luis F'],
    location: 'Mill Street',
    findsCause: 0.7,
    yearsAgo: [4.5, 0],
  },
  {
    name: 'Tom Bracewell',
    spellings: ['Tom B', 'TB'],
    location: 'Mill Street',
    findsCause: 0.5,
    yearsAgo: [99, 2.2],
  },
  { name: 'Casey Wendt', spellings: ['Casey'], location: 'Route 9', findsCause: 0.75, yearsAgo: [99, 0] },
  {
    name: 'Joan Pell',
    spellings: ['J Pell', 'Joan'],
    location: 'Route 9',
    findsCause: 0.66,
    yearsAgo: [2.4, 0],
  },
];

/** Who is on the bench at this place on this day: the usual hands do most of the work. */
export function pickTechnician(random: Random, location: Location, yearsAgo: number): Technician {
  const here = TECHNICIANS.filter(({ yearsAgo: [from, to] }) => yearsAgo <= from && yearsAgo >= to);
  return random.weighted(here.map((person) => [person, person.location === location ? 6 : 1] as const));
}

export const spellingOf = (technician: Technician, random: Random): string =>
  random.chance(0.72) ? technician.spellings[0] : random.pick(technician.spellings);

export interface Customer {
  ref: string;
  name: string;
  phone: string;
}

const FIRST =
  'Alma Ben Carla Dirk Edie Floyd Greta Hank Iris Joel Kay Lyle Mona Ned Opal Pete Rhea Stan Tess Vern Wanda Abe Cleo Doyle Fern Gus Hazel Ike June Kirk'.split(
    ' ',
  );
const LAST_START =
  'Ash Bram Carl Dun Elm Fair Gar Hol Ing Kel Lam Mar Nor Ot Pen Quil Rad Sel Thorn Ul Wal Wes Yar'.split(
    ' ',
  );
const LAST_END = 'by dell field ford gate ham ley lock mere ridge son stead ton well wick'.split(' ');
const TRADE = ['Lawn Care', 'Grounds', 'Landscaping', 'Property Service', 'Mowing'];
const PUBLIC = ['Township', 'School District', 'Parks Dept', 'Cemetery Assn'];

/** Invented people; every phone number is in the 555 exchange. */
export function createCustomer(random: Random, index: number, useClass: UseClass): Customer {
  const surname = random.pick(LAST_START) + random.pick(LAST_END);
  const names: Record<UseClass, string> = {
    homeowner: `${random.pick(FIRST)} ${surname}`,
    commercial: `${surname} ${random.pick(TRADE)}`,
    rental: `${surname} Rentals`,
    municipal: `${surname} ${random.pick(PUBLIC)}`,
  };
  return {
    ref: `C-${String(1000 + index)}`,
    name: names[useClass],
    phone: `555-${String((index * 7919 + 142) % 10000).padStart(4, '0')}`,
  };
}
