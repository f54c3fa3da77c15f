import type { Model, UseClass } from './makers';
import { createCustomer, LOCATIONS } from './people';
import type { Customer, Location } from './people';
import type { Random } from './random';

export interface Unit {
  index: number;
  model: Model;
  useClass: UseClass;
  customer: Customer;
  location: Location;
  /** Empty where the plate is gone. */
  serial: string;
  /** The shop's own tag, for machines without a serial. */
  ref: string;
  engineSerial: string;
  inServiceDay: number;
  /** From this day the shop sees its repairs. */
  knownFromDay: number;
  inRegister: boolean;
  hoursPerYear: number;
  /** Gamma-like factor on every hazard: some machines are simply used harder. */
  frailty: number;
  servicesPerYear: number;
}

export interface FleetPlan {
  models: readonly Model[];
  registered: number;
  walkIns: number;
  /** First day of the shop's records and the day on which they end. */
  firstDay: number;
  asOfDay: number;
  /** Share of machines without a serial. */
  plateGone: number;
}

function pickUseClass(random: Random, model: Model): UseClass {
  if (!random.chance(model.commercialShare)) return 'homeowner';
  return random.weighted([['commercial', 80] as const, ['rental', 8] as const, ['municipal', 12] as const]);
}

function pickHoursPerYear(random: Random, model: Model, useClass: UseClass): number {
  const scale = model.productType === 'snow' ? 0.55 : model.productType === 'handheld' ? 0.6 : 1;
  if (useClass === 'homeowner') return scale * random.between(40, 100);
  if (useClass === 'commercial') return scale * random.between(500, 760);
  return scale * random.between(220, 460);
}

/** Half of the time the machine is older than the shop's records, and is known from their first day only. */
function pickInServiceDay(random: Random, plan: FleetPlan): number {
  return random.chance(0.5)
    ? plan.firstDay - random.whole(30, 900)
    : random.whole(plan.firstDay, plan.asOfDay - 45);
}

const nearOne = (random: Random): number =>
  (random.exponential(1) + random.exponential(1) + random.exponential(1) + random.exponential(1)) / 4;

type CustomerBook = Record<UseClass, Customer[]>;

/** Outfits own several machines, households mostly one. */
function pickCustomer(random: Random, book: CustomerBook, index: number, useClass: UseClass): Customer {
  const known = book[useClass];
  if (known.length > 0 && random.chance(useClass === 'homeowner' ? 0.15 : 0.75)) return random.pick(known);
  const customer = createCustomer(random, index, useClass);
  known.push(customer);
  return customer;
}

function createUnit(random: Random, plan: FleetPlan, index: number, book: CustomerBook): Unit {
  const model = random.weighted(plan.models.map((entry) => [entry, entry.weight] as const));
  const useClass = pickUseClass(random, model);
  const inServiceDay = pickInServiceDay(random, plan);
  const inRegister = index < plan.registered;
  const plateGone = random.chance(plan.plateGone) || (!inRegister && random.chance(0.5));
  return {
    index,
    model,
    useClass,
    customer: pickCustomer(random, book, index, useClass),
    location: random.chance(0.68) ? LOCATIONS[0] : LOCATIONS[1],
    serial: plateGone
      ? ''
      : `${model.maker.slice(0, 2).toUpperCase()}${random.whole(10, 99)}${String(100000 + index * 37 + random.whole(0, 36))}`,
    ref: plateGone && inRegister ? `MSE-${String(1 + index).padStart(4, '0')}` : '',
    engineSerial: random.chance(0.5) ? `${random.whole(10, 99)}-${random.whole(100000, 999999)}` : '',
    inServiceDay,
    knownFromDay: Math.max(inServiceDay, plan.firstDay, inRegister ? 0 : inServiceDay + 200),
    inRegister,
    hoursPerYear: pickHoursPerYear(random, model, useClass),
    frailty: 0.55 + 0.45 * nearOne(random),
    servicesPerYear:
      useClass === 'homeowner' ? random.pick([0, 0.5, 0.8, 0.95]) : random.pick([0.7, 0.95, 1, 1]),
  };
}

export function createFleet(random: Random, plan: FleetPlan): Unit[] {
  const book: CustomerBook = { homeowner: [], commercial: [], rental: [], municipal: [] };
  return Array.from({ length: plan.registered + plan.walkIns }, (_, index) =>
    createUnit(random, plan, index, book),
  );
}
