import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { dayNumber } from '../../analytics/records/day-number';
import type { PartLife } from '../../analytics/records/part-life';
import type { Transaction } from '../db/client';
import { allOf, idList, selectRows } from '../db/rows';

const lifeRow = z.object({
  id: z.string(),
  unitId: z.string(),
  modelId: z.string().nullable(),
  componentId: z.string(),
  partId: z.string().nullable(),
  origin: z.enum(['fitted', 'in_service', 'assumed_original']),
  startRepairId: z.string().nullable(),
  startOn: z.string().nullable(),
  endRepairId: z.string().nullable(),
  endOn: z.string(),
  outcome: z.enum(['failed', 'damage', 'censored', 'unknown']),
  entryHours: z.number().nullable(),
  exitHours: z.number().nullable(),
  entryDays: z.number().nullable(),
  exitDays: z.number().nullable(),
  isDeadOnArrival: z.boolean(),
  setAsideReason: z.string().nullable(),
  isBetween: z.boolean(),
  isUnitInRegister: z.boolean(),
});

/** Part lives as the last analysis derived them, of some models (null: all) and one component (null: all). */
export async function loadLives(
  tx: Transaction,
  scope: { componentId: string | null; modelIds: readonly string[] | null },
): Promise<PartLife[]> {
  const rows = await selectRows(
    tx,
    lifeRow,
    sql`SELECT l.id, l.unit_id AS "unitId", l.model_id AS "modelId", l.component_id AS "componentId",
      l.part_id AS "partId", l.origin, l.start_repair_id AS "startRepairId", l.start_on AS "startOn",
      l.end_repair_id AS "endRepairId", l.end_on AS "endOn", l.outcome, l.entry_hours AS "entryHours",
      l.exit_hours AS "exitHours", l.entry_days AS "entryDays", l.exit_days AS "exitDays",
      l.is_dead_on_arrival AS "isDeadOnArrival", l.set_aside_reason AS "setAsideReason",
      l.is_between_readings AS "isBetween",
      u.is_registered AS "isUnitInRegister"
    FROM part_lives l JOIN units u ON u.shop_id = l.shop_id AND u.id = l.unit_id
    WHERE ${allOf([
      scope.componentId === null ? undefined : sql`l.component_id = ${scope.componentId}`,
      scope.modelIds === null ? undefined : sql`l.model_id = ANY(${idList(scope.modelIds)})`,
    ])} ORDER BY l.id`,
  );
  return rows.map(lifeOf);
}

function lifeOf(row: z.output<typeof lifeRow>): PartLife {
  const { startOn, endOn, entryHours, exitHours, entryDays, exitDays, setAsideReason, isBetween, ...life } =
    row;
  return {
    ...life,
    engine: 0,
    partMaker: null,
    startDay: startOn === null ? null : dayNumber(startOn),
    endDay: dayNumber(endOn),
    endReason: null,
    hours: spanOf(entryHours, exitHours, setAsideReason === 'meter_restarted', isBetween),
    hoursMissing: null,
    days: spanOf(entryDays, exitDays, false),
    daysMissing: null,
  };
}

function spanOf(entry: number | null, exit: number | null, isCut: boolean, isBetween = false) {
  return exit === null ? null : { entry: entry ?? 0, exit, isCut, isBetween };
}
