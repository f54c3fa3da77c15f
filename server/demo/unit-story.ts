import { componentNamed } from './components';
import type { Unit } from './fleet';
import { openVisit, startHistory, technicianFor, work } from './history';
import type { History } from './history';
import { tellChain } from './episodes';
import { inHand } from './phrases';
import { nextServiceDay, tellService, yearOf } from './services';
import { tellStaleFuel, tellTrouble } from './troubles';
import { dayOf } from './calendar';
import type { World } from './world';

/** How often a household's machine will not start in spring because of old fuel. */
const STALE_FUEL_CHANCE = 0.11;

function tellSetup(history: History, day: number): void {
  const { random } = history;
  const visit = openVisit(history, day, {
    kind: 'setup',
    subject: componentNamed('Engine oil'),
    words: {
      complaint: inHand(random, 'set up new machine'),
      cause: '',
      correction: inHand(
        random,
        random.pick([
          'pdi done, deck leveled, interlocks tested',
          'set up, fueled, tested',
          'assembled and checked',
        ]),
      ),
      notes: '',
    },
    payType: 'shop',
    technician: technicianFor(history, day),
    benchDays: 0,
  });
  visit.laborOp = 'SET-10';
  visit.meterHours = history.unit.model.hasMeter ? 0.2 : null;
  work(visit, 'Engine oil', 'adjusted');
}

/** A machine that was in the shop over the winter starts. */
function tellSpring(history: History, day: number): void {
  if (history.freeFromDay < day - 130) tellStaleFuel(history, day);
}

interface Calendar {
  serviceDay: number;
  springDay: number;
}

function planYear(history: History, year: number): Calendar {
  const { random, unit } = history;
  const serviced = random.chance(unit.servicesPerYear);
  const stale = unit.useClass === 'homeowner' && random.chance(STALE_FUEL_CHANCE);
  const firstStart = unit.model.season === 'snow' ? '11-20' : '03-25';
  const tooEarly = (day: number): boolean => day < unit.inServiceDay + 150;
  const serviceDay = serviced ? nextServiceDay(history, year) : Infinity;
  const springDay = stale ? dayOf(`${String(year)}-${firstStart}`) + random.whole(0, 45) : Infinity;
  return {
    serviceDay: tooEarly(serviceDay) ? Infinity : serviceDay,
    springDay: tooEarly(springDay) ? Infinity : springDay,
  };
}

/** Schedules what follows the calendar rather than the meter. */
function planCalendar(history: History, carelessClutchDay: number | undefined): void {
  const { unit, world, random } = history;
  if (unit.inRegister && unit.inServiceDay >= world.firstDay && random.chance(0.3)) {
    history.later.push({ day: unit.inServiceDay, tell: (day) => tellSetup(history, day) });
  }
  for (let year = yearOf(unit.inServiceDay); year <= yearOf(world.asOfDay); year += 1) {
    const { serviceDay, springDay } = planYear(history, year);
    if (serviceDay !== Infinity)
      history.later.push({ day: serviceDay, tell: (day) => tellService(history, day) });
    if (springDay !== Infinity)
      history.later.push({ day: springDay, tell: (day) => tellSpring(history, day) });
  }
  if (carelessClutchDay !== undefined) {
    const damaged = ['PTO switch', 'Main fuse'];
    const tell = (day: number): void =>
      tellChain(history, day, componentNamed('PTO clutch'), damaged, { careless: true });
    history.later.push({ day: carelessClutchDay, tell });
  }
  history.later.sort((a, b) => a.day - b.day);
}

/** Everything that the shop saw of one machine, in the order of the calendar. */
export function tellUnit(unit: Unit, world: World, carelessClutchDay?: number): History {
  const history = startHistory(unit, world);
  const clock = world.clocks[unit.model.season];
  planCalendar(history, carelessClutchDay);
  for (;;) {
    const slot = history.wear.next();
    const failDay = slot
      ? clock.dayAfter(unit.inServiceDay, slot.failsAtHours / unit.hoursPerYear)
      : Infinity;
    const later = history.later[0];
    if (later && later.day <= failDay) {
      if (later.day > world.asOfDay) break;
      history.later.shift();
      later.tell(later.day);
    } else {
      if (!slot || failDay > world.asOfDay) break;
      const delay = Math.round(history.random.exponential(unit.useClass === 'homeowner' ? 5 : 1.5));
      tellTrouble(history, failDay + delay, slot.component);
    }
    if (history.freeFromDay > world.asOfDay) break;
  }
  return history;
}
