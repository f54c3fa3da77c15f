import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { USE_CLASSES } from '../../../shared/basics';
import type { unitQuery } from '../../../shared/machines';
import type { Transaction } from '../../db/client';
import { effectiveComebacks } from '../../db/effective-comebacks';
import { foldText } from '../../db/fold';
import { allOf, anywhere, modelName, namedColumn, selectRows, unitName } from '../../db/rows';

const listedRow = z.object({
  id: z.string(),
  name: z.string(),
  identity: z.enum(['serial', 'tag', 'customer_model']),
  serial: z.string().nullable(),
  unitRef: z.string().nullable(),
  model: namedColumn.nullable(),
  inServiceOn: z.string().nullable(),
  useClass: z.enum(USE_CLASSES).nullable(),
  repairs: z.number(),
  lastRepairOn: z.string().nullable(),
  lastMeterHours: z.number().nullable(),
  sortKey: z.string(),
});
export type UnitListedRow = z.output<typeof listedRow>;

const sortKey = sql`coalesce(u.serial_key, u.unit_ref_key, '')`;

/** The last reading that is used: of the register where it is later than any repair's. */
const lastMeterHours = sql`(
  SELECT hours::float8 FROM (
    SELECT r.meter_hours AS hours, r.work_on AS read_on FROM repairs r
    WHERE r.shop_id = u.shop_id AND r.unit_id = u.id AND r.meter_hours IS NOT NULL AND r.meter_fault IS NULL
    UNION ALL SELECT u.register_meter_hours, u.register_read_on
    WHERE u.register_meter_hours IS NOT NULL AND u.register_read_on IS NOT NULL
  ) reading ORDER BY read_on DESC LIMIT 1)`;

const listedColumns = sql`u.id, ${unitName} AS name, u.identity, u.serial, u.unit_ref AS "unitRef",
  CASE WHEN m.id IS NULL THEN NULL ELSE json_build_object('id', m.id, 'name', ${modelName}) END AS model,
  u.in_service_on AS "inServiceOn", u.use_class AS "useClass", seen.repairs, seen.last_on AS "lastRepairOn",
  ${lastMeterHours} AS "lastMeterHours", ${sortKey} AS "sortKey"`;

const listedJoins = sql`LEFT JOIN models m ON m.shop_id = u.shop_id AND m.id = u.model_id
  CROSS JOIN LATERAL (SELECT count(*)::int AS repairs, max(r.work_on) AS last_on FROM repairs r
    WHERE r.shop_id = u.shop_id AND r.unit_id = u.id) seen`;

type UnitFilter = Omit<z.output<typeof unitQuery>, 'limit' | 'cursor'>;

/** One page by serial or tag. */
export function findUnits(
  tx: Transaction,
  filter: UnitFilter,
  page: { after: readonly [string, string] | undefined; rows: number; searchesCustomers: boolean },
): Promise<UnitListedRow[]> {
  const { q, serial, maker, model, modelId } = filter;
  const pattern = q?.trim() ? anywhere(q) : undefined;
  const customer = page.searchesCustomers
    ? sql`OR u.customer_id IN (SELECT id FROM customers WHERE name ILIKE ${pattern})`
    : sql.empty();
  const conditions = allOf([
    pattern
      ? sql`(u.serial ILIKE ${pattern} OR u.unit_ref ILIKE ${pattern}
          OR u.model_id IN (SELECT m.id FROM models m WHERE ${modelName} ILIKE ${pattern}) ${customer})`
      : undefined,
    serial ? sql`u.serial_key = ${foldText(serial)}` : undefined,
    maker ? sql`u.model_id IN (SELECT id FROM models WHERE maker_key = ${foldText(maker)})` : undefined,
    model ? sql`u.model_id IN (SELECT id FROM models WHERE model_key = ${foldText(model)})` : undefined,
    modelId ? sql`u.model_id = ${modelId}` : undefined,
    page.after ? sql`(${sortKey}, u.id) > (${page.after[0]}, ${page.after[1]}::uuid)` : undefined,
  ]);
  return selectRows(
    tx,
    listedRow,
    sql`WITH page AS MATERIALIZED (
      SELECT u.* FROM units u WHERE ${conditions} ORDER BY ${sortKey}, u.id LIMIT ${page.rows}
    )
    SELECT ${listedColumns} FROM page u ${listedJoins} ORDER BY ${sortKey}, u.id`,
  );
}

const wholeRow = listedRow.extend({
  customer: z
    .object({ ref: z.string(), name: z.string().nullable(), phone: z.string().nullable() })
    .nullable(),
  knownFromOn: z.string().nullable(),
  isRegistered: z.boolean(),
  registerMeterHours: z.number().nullable(),
  registerReadOn: z.string().nullable(),
  engines: z.array(z.object({ name: z.string(), seenFromOn: z.string().nullable() })),
});
export type UnitRow = z.output<typeof wholeRow>;

export async function findUnit(tx: Transaction, id: string): Promise<UnitRow | undefined> {
  const [row] = await selectRows(
    tx,
    wholeRow,
    sql`SELECT ${listedColumns}, u.known_from_on AS "knownFromOn", u.is_registered AS "isRegistered",
      u.register_meter_hours::float8 AS "registerMeterHours", u.register_read_on AS "registerReadOn",
      CASE WHEN k.id IS NULL THEN NULL
        ELSE json_build_object('ref', k.ref, 'name', k.name, 'phone', k.phone) END AS customer,
      (SELECT coalesce(json_agg(json_build_object('name', concat_ws(' ', g.maker, g.model, g.serial),
        'seenFromOn', g.seen_from_on) ORDER BY g.seen_from_on NULLS FIRST, g.id), '[]')
        FROM unit_engines g WHERE g.shop_id = u.shop_id AND g.unit_id = u.id) AS engines
    FROM units u ${listedJoins} LEFT JOIN customers k ON k.shop_id = u.shop_id AND k.id = u.customer_id
    WHERE u.id = ${id}`,
  );
  return row;
}

const visitRow = z.object({
  id: z.string(),
  number: z.string(),
  ticketType: z.string(),
  openedOn: z.string().nullable(),
  readyOn: z.string().nullable(),
  closedOn: z.string(),
  workOn: z.string(),
  meterHours: z.number().nullable(),
  complaint: z.string().nullable(),
  correction: z.string().nullable(),
  totalCents: z.number(),
  isComebackOf: namedColumn.nullable(),
  lines: z.array(
    z.object({
      kind: z.string(),
      component: namedColumn.nullable(),
      part: namedColumn.nullable(),
      reason: z.string(),
      workDone: z.string().nullable(),
      quantity: z.number(),
    }),
  ),
});
export type UnitVisitRow = z.output<typeof visitRow>;

/** Every repair of a machine, oldest first, with the lines that say what was fitted or done. */
export function findVisits(tx: Transaction, unitId: string): Promise<UnitVisitRow[]> {
  return selectRows(
    tx,
    visitRow,
    sql`SELECT r.id, r.number, r.ticket_type AS "ticketType", r.opened_on AS "openedOn", r.ready_on AS "readyOn",
      r.closed_on AS "closedOn", r.work_on AS "workOn", r.meter_hours::float8 AS "meterHours", r.complaint, r.correction,
      (coalesce(lines.amount, 0) + coalesce(r.labor_amount_cents, lines.labor, 0))::float8 AS "totalCents",
      coalesce(lines.list, '[]') AS lines,
      (SELECT json_build_object('id', f.id, 'name', f.number) FROM ${effectiveComebacks} e
        JOIN repairs f ON f.shop_id = r.shop_id AND f.id = e.first_id
        WHERE e.return_id = r.id AND e.is_counted LIMIT 1) AS "isComebackOf"
    FROM repairs r
    LEFT JOIN LATERAL (
      SELECT sum(x.amount_cents) AS amount, sum(x.labor_amount_cents) AS labor,
        json_agg(json_build_object('kind', x.kind, 'reason', x.reason, 'workDone', x.work_done,
          'quantity', coalesce(x.quantity, 1)::float8,
          'component', CASE WHEN c.id IS NULL THEN NULL ELSE json_build_object('id', c.id, 'name', c.name) END,
          'part', CASE WHEN p.id IS NULL THEN NULL ELSE json_build_object('id', p.id, 'name', p.number) END)
          ORDER BY x.position) AS list
      FROM repair_lines x
      LEFT JOIN components c ON c.shop_id = x.shop_id AND c.id = x.component_id
      LEFT JOIN parts p ON p.shop_id = x.shop_id AND p.id = x.part_id
      WHERE x.shop_id = r.shop_id AND x.repair_id = r.id
    ) lines ON true
    WHERE r.unit_id = ${unitId} ORDER BY r.work_on, r.id`,
  );
}
