import { dateOf, openDay } from './calendar';
import { COMPONENTS } from './components';
import { centsText, costCents, doorRateCents, priceThenCents } from './money';
import type { Model } from './makers';
import { repairRow } from './native-rows';
import type { RepairRow } from './native-rows';
import { LOCATIONS } from './people';
import type { Random } from './random';
import type { World } from './world';

const SOLD_LOOSE = COMPONENTS.filter(({ servicedShare }) => servicedShare !== undefined);

const yardDay = (random: Random, world: World): number =>
  openDay(random.whole(world.firstDay, world.asOfDay - 2));

function counterSale(random: Random, world: World, models: readonly Model[], at: number): RepairRow[] {
  const day = yardDay(random, world);
  const model = random.pick(models);
  const sold = SOLD_LOOSE.filter(({ builds }) => builds.includes(model.build)).slice(0, random.whole(1, 3));
  const notes = random.pick(['over the counter', 'counter sale', 'cust installs', 'PARTS ONLY']);
  return sold.map((component) => {
    const part = world.catalog.partFor(model, component, day, random);
    const amountCents = priceThenCents(part.listCents, world.yearsAgo(day)) * component.quantity;
    return repairRow({
      location: LOCATIONS[0],
      repair_number: `S${String(3001 + at)}`,
      ticket_type: 'counter_sale',
      opened_on: dateOf(day),
      ready_on: dateOf(day),
      closed_on: dateOf(day),
      picked_up_on: dateOf(day),
      maker: model.maker,
      model: model.model,
      product_type: model.productType,
      notes,
      line_kind: 'part',
      part_number: part.number,
      part_maker: part.maker,
      part_description: part.description,
      supplier: part.supplier,
      component: component.name,
      line_reason: 'maintenance',
      quantity: String(component.quantity),
      part_amount: centsText(amountCents),
      part_cost: centsText(costCents(amountCents)),
      pay_type: 'customer',
    });
  });
}

function internalTicket(random: Random, world: World, at: number): RepairRow {
  const day = yardDay(random, world);
  return repairRow({
    location: LOCATIONS[0],
    repair_number: `N${String(101 + at)}`,
    ticket_type: 'internal',
    opened_on: dateOf(day),
    ready_on: dateOf(day),
    closed_on: dateOf(day),
    picked_up_on: dateOf(day),
    complaint: random.pick(['shop mower', 'rental fleet wash', 'yard trailer lights', 'lift inspection']),
    correction: random.pick(['done', 'greased and checked', 'fixed', 'OK']),
    line_kind: 'labor',
    labor_op: 'SHOP',
    labor_hours: '0.5',
    labor_amount: centsText(Math.round(doorRateCents(world.yearsAgo(day)) / 2)),
    pay_type: 'shop',
  });
}

/** Parts over the counter and the shop's own small jobs: tickets that enter no rate. */
export function counterRows(random: Random, world: World, models: readonly Model[]): RepairRow[] {
  const sales = Array.from({ length: 130 }, (_, at) => counterSale(random, world, models, at)).flat();
  const internal = Array.from({ length: 24 }, (_, at) => internalTicket(random, world, at));
  return [...sales, ...internal];
}
