import { dayOf, latestMatureMonth, monthOf } from './calendar';
import { CHAINS } from './cascades';
import { CLUTCH_SUPERSESSION } from './catalog';
import { counterRows } from './counter';
import { createFleet } from './fleet';
import type { Unit } from './fleet';
import { FAMILIES, MODELS, modelsOfFamily } from './makers';
import type { PartRow, RepairRow, UnitRow } from './native-rows';
import { TECHNICIANS } from './people';
import { createRandom } from './random';
import { unitRow } from './register';
import { numberVisits, repairRows } from './tickets';
import { truthOf } from './truth';
import type { Truth } from './truth';
import { tellUnit } from './unit-story';
import { createWorld } from './world';

export interface SimulationOptions {
  /** The last day of the records, 'YYYY-MM-DD'. */
  asOf: string;
  seed?: number;
}

export interface DemoFamily {
  name: string;
  shares: 'deck' | 'engine' | 'clutch';
  models: { maker: string; model: string }[];
}

export interface DemoTechnician {
  name: string;
  spellings: string[];
  location: string;
  isHere: boolean;
}

export interface Millrace {
  /** One row per line, the rows of a repair together, in the order of opening. */
  repairs: RepairRow[];
  units: UnitRow[];
  parts: PartRow[];
  families: DemoFamily[];
  people: { technicians: DemoTechnician[] };
  truth: Truth;
}

const SEASONS = 6;
const REGISTERED_UNITS = 1500;
const WALK_INS = 60;
/** Clutches of the bad month that were sent home with a new fuse. */
const CARELESS_CLUTCHES = 26;

function pickCareless(fleet: readonly Unit[], asOfDay: number, seed: number): Map<number, number> {
  const random = createRandom(seed, 'bad month');
  const { firstDay, lastDay } = latestMatureMonth(asOfDay, 90);
  const clutchModels = modelsOfFamily(CHAINS[0]?.family ?? '');
  const able = fleet.filter(
    (unit) => unit.inRegister && clutchModels.has(unit.model.model) && unit.inServiceDay < firstDay - 200,
  );
  const days = new Map<number, number>();
  while (days.size < Math.min(CARELESS_CLUTCHES, able.length)) {
    days.set(random.pick(able).index, random.whole(firstDay, lastDay - 8));
  }
  return days;
}

/** The demo shop, *Millrace Small Engine*: six invented seasons that end on `asOf`, the same for the same seed. */
export function simulateMillrace({ asOf, seed = 4600 }: SimulationOptions): Millrace {
  const asOfDay = dayOf(asOf);
  const firstDay = asOfDay - Math.round(SEASONS * 365.25);
  const world = createWorld(seed, asOfDay, firstDay);
  const plan = {
    models: MODELS,
    registered: REGISTERED_UNITS,
    walkIns: WALK_INS,
    firstDay,
    asOfDay,
    plateGone: 0.05,
  };
  const fleet = createFleet(createRandom(seed, 'fleet'), plan);
  const careless = pickCareless(fleet, asOfDay, seed);
  const histories = fleet.map((unit) => tellUnit(unit, world, careless.get(unit.index)));
  const closed = histories.flatMap(({ visits }) => visits).filter(({ closedDay }) => closedDay <= asOfDay);
  const numbered = numberVisits(closed);
  const random = createRandom(seed, 'tickets');
  return {
    repairs: [
      ...numbered.flatMap((entry) => repairRows(entry, world, random)),
      ...counterRows(createRandom(seed, 'counter'), world, MODELS),
    ],
    units: histories.filter(({ unit }) => unit.inRegister).map(unitRow),
    parts: world.catalog.rows(MODELS),
    families: FAMILIES.map(({ name, shares, models }) => ({
      name,
      shares,
      models: MODELS.filter(({ model }) => models.includes(model)).map(({ maker, model }) => ({
        maker,
        model,
      })),
    })),
    people: {
      technicians: TECHNICIANS.map(({ name, spellings, location, yearsAgo }) => ({
        name,
        spellings: [...spellings],
        location,
        isHere: yearsAgo[1] === 0,
      })),
    },
    truth: truthOf(numbered, monthOf(latestMatureMonth(asOfDay, 90).firstDay), CLUTCH_SUPERSESSION),
  };
}
