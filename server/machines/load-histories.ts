import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { dayNumber } from '../../analytics/records/day-number';
import { recurrence, type ModelRecurrence } from '../../analytics/records/recurrence';
import type { Transaction } from '../db/client';
import { idList, selectRows } from '../db/rows';

const unitRow = z.object({
  id: z.string(),
  modelId: z.string().nullable(),
  inRegister: z.boolean(),
  inServiceOn: z.string().nullable(),
  knownFromOn: z.string().nullable(),
  readOn: z.string().nullable(),
  meterHours: z.number().nullable(),
});
const visitRow = z.object({ unitId: z.string(), openingDay: z.number(), isEligible: z.boolean() });

/** How often the machines of some models were repaired, by their age, as of the last analysis. */
export async function loadHistories(
  tx: Transaction,
  modelIds: readonly string[],
  asOf: string,
): Promise<ModelRecurrence[]> {
  const units = await selectRows(
    tx,
    unitRow,
    sql`SELECT id, model_id AS "modelId", is_registered AS "inRegister", in_service_on AS "inServiceOn",
      known_from_on AS "knownFromOn", register_read_on AS "readOn", register_meter_hours::float8 AS "meterHours"
    FROM units WHERE model_id = ANY(${idList(modelIds)}) ORDER BY id`,
  );
  const facts = await selectRows(
    tx,
    visitRow,
    sql`SELECT r.unit_id AS "unitId", coalesce(r.opened_on, r.work_on) - DATE '1970-01-01' AS "openingDay",
      f.left_out IS NULL AS "isEligible"
    FROM repairs r JOIN repair_facts f ON f.shop_id = r.shop_id AND f.repair_id = r.id
    JOIN units u ON u.shop_id = r.shop_id AND u.id = r.unit_id
    WHERE u.model_id = ANY(${idList(modelIds)})`,
  );
  const dayOf = (on: string | null) => (on === null ? null : dayNumber(on));
  return recurrence({
    units: units.map(({ inServiceOn, knownFromOn, readOn, meterHours, ...unit }) => ({
      ...unit,
      inServiceDay: dayOf(inServiceOn),
      knownFromDay: dayOf(knownFromOn),
      isActive: unit.inRegister,
      readings: readOn === null ? [] : [{ day: dayNumber(readOn), hours: meterHours }],
    })),
    facts,
    asOfDay: dayNumber(asOf),
  });
}
