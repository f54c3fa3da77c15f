import { hoursAt, isInIt, replace, work } from './history';
import type { History } from './history';
import { COMPONENTS } from './components';
import type { Visit } from './visits';

/** What gives out within so many days is often seen while the machine is on the lift. */
const LOOK_AHEAD_DAYS = 95;

const neighbours: Readonly<Record<string, string>> = {
  'PTO clutch': 'PTO switch',
  'PTO switch': 'Seat switch',
  Battery: 'Starter motor',
  'Starter solenoid': 'Battery',
  'Starter motor': 'Battery',
  'Ignition coil': 'Spark plug',
  Carburetor: 'Fuel pump',
  'Fuel pump': 'Carburetor',
  'Deck belt': 'Spindle bearing',
  'Drive belt': 'Hydro pump',
};

/** Replaces what is found worn, now and then changes a part while it is apart, and notes what tested good. */
export function inspect(history: History, visit: Visit, subject: string): void {
  const { random, wear } = history;
  const soonHours = hoursAt(history, visit.openedDay + LOOK_AHEAD_DAYS);
  for (const { component, failsAtHours } of wear.slots) {
    const due = failsAtHours <= soonHours && failsAtHours !== Infinity && !isInIt(visit, component.name);
    if (due && random.chance(component.seenWorn)) {
      replace(history, visit, component.name, random.chance(0.7) ? 'failed' : 'preventive');
    }
  }
  if (visit.kind !== 'trouble') return;
  if (subject === 'PTO clutch' && random.chance(0.14) && !isInIt(visit, 'Deck belt')) {
    replace(history, visit, 'Deck belt', 'preventive');
  }
  const neighbour = neighbours[subject];
  const built = COMPONENTS.some(
    ({ name, builds }) => name === neighbour && builds.includes(history.unit.model.build),
  );
  if (neighbour && built && random.chance(0.1) && !isInIt(visit, neighbour))
    work(visit, neighbour, 'tested_good');
}
