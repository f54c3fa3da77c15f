import { dateOf } from './calendar';
import { hoursAt, meterAt } from './history';
import type { History } from './history';
import type { UnitRow } from './native-rows';
import { createRandom } from './random';

/** The register's row of one machine, with a reading taken after its last visit where somebody asked for it. */
export function unitRow(history: History): UnitRow {
  const { unit, world, visits } = history;
  const random = createRandom(world.seed, 'register', unit.index);
  const lastVisitDay = visits[visits.length - 1]?.pickedUpDay ?? unit.knownFromDay;
  const readDay = Math.max(lastVisitDay, world.asOfDay - random.whole(1, 200));
  const isRead = readDay <= world.asOfDay && hoursAt(history, readDay) > 2 && random.chance(0.85);
  const meterHours = isRead ? meterAt(history, readDay) : null;
  return {
    unit_serial: unit.serial,
    unit_ref: unit.ref,
    maker: unit.model.maker,
    model: unit.model.model,
    product_type: unit.model.productType,
    in_service_on: dateOf(unit.inServiceDay),
    use_class: unit.useClass,
    meter_hours: meterHours === null ? '' : meterHours.toFixed(1),
    meter_read_on: meterHours === null ? '' : dateOf(readDay),
    known_from_on: unit.knownFromDay === unit.inServiceDay ? '' : dateOf(unit.knownFromDay),
  };
}
