import { sql } from 'drizzle-orm';
import { dayText } from '../../../analytics/records/day-number';
import type { PartLife } from '../../../analytics/records/part-life';
import type { Transaction } from '../../db/client';
import type { JudgedMeter } from './cascade-input';

const ROWS_AT_ONCE = 5000;

/** Replaces the shop's part lives by those just derived. */
export async function writeLives(tx: Transaction, lives: readonly PartLife[]): Promise<void> {
  await tx.execute(sql`DELETE FROM part_lives WHERE shop_id = current_shop_id()`);
  for (let from = 0; from < lives.length; from += ROWS_AT_ONCE) {
    const rows = JSON.stringify(lives.slice(from, from + ROWS_AT_ONCE).map(toRow));
    await tx.execute(sql`
      INSERT INTO part_lives (shop_id, unit_id, model_id, component_id, part_id, origin, start_repair_id, end_repair_id,
        start_on, end_on, outcome, entry_hours, exit_hours, entry_days, exit_days, is_dead_on_arrival, set_aside_reason,
        is_between_readings)
      SELECT current_shop_id(), unit_id, model_id, component_id, part_id, origin, start_repair_id, end_repair_id,
        start_on, end_on, outcome, entry_hours, exit_hours, entry_days, exit_days, is_dead_on_arrival, set_aside_reason,
        is_between_readings
      FROM json_to_recordset(${rows}::json) AS life(unit_id uuid, model_id uuid, component_id uuid, part_id uuid,
        origin text, start_repair_id uuid, end_repair_id uuid, start_on date, end_on date, outcome text,
        entry_hours float8, exit_hours float8, entry_days float8, exit_days float8, is_dead_on_arrival boolean,
        set_aside_reason text, is_between_readings boolean)`);
  }
}

function toRow(life: PartLife) {
  return {
    unit_id: life.unitId,
    model_id: life.modelId,
    component_id: life.componentId,
    part_id: life.partId,
    origin: life.origin,
    start_repair_id: life.startRepairId,
    end_repair_id: life.endRepairId,
    start_on: life.startDay === null ? null : dayText(life.startDay),
    end_on: dayText(life.endDay),
    outcome: life.outcome,
    entry_hours: life.hours?.entry ?? null,
    exit_hours: life.hours?.exit ?? null,
    entry_days: life.days?.entry ?? null,
    exit_days: life.days?.exit ?? null,
    is_dead_on_arrival: life.isDeadOnArrival,
    is_between_readings: life.hours?.isBetween === true,
    set_aside_reason: life.hours?.isCut ? 'meter_restarted' : life.hoursMissing,
  };
}

/** Notes on each repair why its meter reading is not used; rows that say so already are left alone. */
export async function writeMeterFaults(
  tx: Transaction,
  meters: ReadonlyMap<string, JudgedMeter>,
): Promise<number> {
  const faults = [...meters].flatMap(([id, { fault }]) => (fault === null ? [] : [{ id, fault }]));
  await tx.execute(sql`
    WITH judged AS (SELECT * FROM json_to_recordset(${JSON.stringify(faults)}::json) AS fault(id uuid, fault text))
    UPDATE repairs r SET meter_fault = judged.fault
    FROM repairs also LEFT JOIN judged ON judged.id = also.id
    WHERE r.shop_id = current_shop_id() AND also.shop_id = r.shop_id AND also.id = r.id
      AND (r.meter_fault IS NOT NULL OR judged.id IS NOT NULL) AND r.meter_fault IS DISTINCT FROM judged.fault`);
  return faults.length;
}
