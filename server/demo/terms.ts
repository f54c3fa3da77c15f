import type { Component } from './components';
import { hoursAt } from './history';
import type { History } from './history';
import type { Visit } from './visits';

const NEVER_COVERED = new Set([
  'Deck belt',
  'Drive belt',
  'Auger belt',
  'Blade set',
  'Fuel filter',
  'Spark plug',
  'Tire',
  'Shear pin',
  'Main fuse',
  'Trimmer head',
  'Friction wheel',
  'Flywheel key',
]);

/** Who pays for an ordinary repair: the maker while the machine is young enough, else the customer. */
export function payTypeOf(history: History, component: Component, day: number): Visit['payType'] {
  const { unit, random } = history;
  const ageDays = day - unit.inServiceDay;
  const limitDays = unit.useClass === 'homeowner' ? 730 : 365;
  const covered = ageDays < limitDays && hoursAt(history, day) < 500 && !NEVER_COVERED.has(component.name);
  const stale = component.name === 'Carburetor' && random.chance(0.8);
  return covered && !stale && unit.inRegister ? 'warranty' : 'customer';
}
