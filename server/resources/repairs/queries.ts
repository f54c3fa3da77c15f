import { sql, type SQL } from 'drizzle-orm';
import { z } from 'zod';
import { LINE_KINDS, LINE_REASONS, PAY_TYPES, TICKET_TYPES, WORK_DONE } from '../../../shared/basics';
import type { Transaction } from '../../db/client';
import { daysOfReturn, effectiveComebacks, returnedOn } from '../../db/effective-comebacks';
import { modelName, namedColumn, selectRows, unitName } from '../../db/rows';

const listedRow = z.object({
  id: z.string(),
  number: z.string(),
  location: z.string().nullable(),
  ticketType: z.enum(TICKET_TYPES),
  workOn: z.string(),
  closedOn: z.string(),
  unit: namedColumn.nullable(),
  model: namedColumn.nullable(),
  meterHours: z.number().nullable(),
  complaint: z.string().nullable(),
  components: z.array(namedColumn),
  technicians: z.array(namedColumn),
  totalCents: z.number(),
  cameBackAfterDays: z.number().nullable(),
  isComebackOf: namedColumn.nullable(),
});
export type RepairListedRow = z.output<typeof listedRow>;

const named = (alias: string, name: SQL) =>
  sql`CASE WHEN ${sql.raw(alias)}.id IS NULL THEN NULL ELSE json_build_object('id', ${sql.raw(alias)}.id, 'name', ${name}) END`;

const techniciansOf = sql`(
  SELECT coalesce(json_agg(json_build_object('id', t.id, 'name', t.display_name) ORDER BY t.display_name), '[]')
  FROM repair_technicians rt JOIN technicians t ON t.shop_id = rt.shop_id AND t.id = rt.technician_id
  WHERE rt.shop_id = r.shop_id AND rt.repair_id = r.id)`;

/** What the customer or maker was charged: every line, and the labor once. */
const partsCents = sql`(SELECT coalesce(sum(x.amount_cents), 0) FROM repair_lines x
  WHERE x.shop_id = r.shop_id AND x.repair_id = r.id AND x.kind = 'part')::float8`;
const totalCents = sql`(SELECT coalesce(sum(x.amount_cents), 0) + coalesce(r.labor_amount_cents, sum(x.labor_amount_cents), 0)
  FROM repair_lines x WHERE x.shop_id = r.shop_id AND x.repair_id = r.id)::float8`;

/** Of a repair that a return names, looked up only where it is needed: few returns touch a page. */
const ofRepair = (column: 'return_id' | 'first_id', value: SQL) =>
  sql`(SELECT ${value} FROM repairs s WHERE s.id = e.${sql.raw(column)})`;

/** One page, newest work first. `after` is the sort key of the last row seen. */
export function findRepairs(
  tx: Transaction,
  conditions: SQL,
  page: { after: readonly [string, string] | undefined; rows: number },
): Promise<RepairListedRow[]> {
  const after = page.after
    ? sql`AND (r.work_on, r.id) < (${page.after[0]}::date, ${page.after[1]}::uuid)`
    : sql.empty();
  return selectRows(
    tx,
    listedRow,
    sql`WITH page AS MATERIALIZED (
      SELECT r.shop_id, r.id FROM repairs r WHERE ${conditions} ${after}
      ORDER BY r.work_on DESC, r.id DESC LIMIT ${page.rows}
    ), returns AS MATERIALIZED (
      SELECT e.return_id, e.first_id, e.days FROM ${effectiveComebacks} e
      WHERE e.is_counted
        AND (e.first_id IN (SELECT id FROM page) OR e.return_id IN (SELECT id FROM page))
    ), came_back AS (
      SELECT e.first_id, min(coalesce(e.days, greatest(0, ${ofRepair('return_id', returnedOn)}
        - ${ofRepair('first_id', sql`s.work_on`)}))) AS days
      FROM returns e GROUP BY e.first_id
    ), comes_from AS (
      SELECT e.return_id, e.first_id AS id, ${ofRepair('first_id', sql`s.number`)} AS number FROM returns e
    )
    SELECT r.id, r.number, l.name AS location, r.ticket_type AS "ticketType", r.work_on AS "workOn",
      r.closed_on AS "closedOn", ${named('u', unitName)} AS unit, ${named('m', modelName)} AS model,
      r.meter_hours::float8 AS "meterHours", r.complaint,
      (SELECT coalesce(json_agg(json_build_object('id', c.id, 'name', c.name) ORDER BY c.name), '[]')
        FROM components c WHERE c.shop_id = r.shop_id AND c.id IN (SELECT x.component_id FROM repair_lines x
          WHERE x.shop_id = r.shop_id AND x.repair_id = r.id)) AS components,
      ${techniciansOf} AS technicians, ${totalCents} AS "totalCents",
      b.days AS "cameBackAfterDays", ${named('o', sql`o.number`)} AS "isComebackOf"
    FROM page p JOIN repairs r ON r.shop_id = p.shop_id AND r.id = p.id
    LEFT JOIN locations l ON l.shop_id = r.shop_id AND l.id = r.location_id
    LEFT JOIN units u ON u.shop_id = r.shop_id AND u.id = r.unit_id
    LEFT JOIN models m ON m.shop_id = r.shop_id AND m.id = r.model_id
    LEFT JOIN came_back b ON b.first_id = r.id
    LEFT JOIN comes_from o ON o.return_id = r.id
    ORDER BY r.work_on DESC, r.id DESC`,
  );
}

const wholeRow = z.object({
  id: z.string(),
  number: z.string(),
  location: z.string().nullable(),
  ticketType: z.enum(TICKET_TYPES),
  openedOn: z.string().nullable(),
  readyOn: z.string().nullable(),
  closedOn: z.string(),
  pickedUpOn: z.string().nullable(),
  workOn: z.string(),
  unit: namedColumn.nullable(),
  serialText: z.string().nullable(),
  unitRefText: z.string().nullable(),
  model: namedColumn.nullable(),
  customer: z
    .object({ ref: z.string(), name: z.string().nullable(), phone: z.string().nullable() })
    .nullable(),
  engineMaker: z.string().nullable(),
  engineModel: z.string().nullable(),
  engineSerial: z.string().nullable(),
  meterHours: z.number().nullable(),
  meterFault: z.string().nullable(),
  complaint: z.string().nullable(),
  cause: z.string().nullable(),
  correction: z.string().nullable(),
  notes: z.string().nullable(),
  technicianText: z.string().nullable(),
  technicians: z.array(namedColumn),
  payType: z.enum(PAY_TYPES).nullable(),
  laborOp: z.string().nullable(),
  laborHours: z.number().nullable(),
  laborAmountCents: z.number().nullable(),
  partsAmountCents: z.number(),
  totalCents: z.number(),
});
export type RepairRow = z.output<typeof wholeRow>;

export async function findRepair(tx: Transaction, id: string): Promise<RepairRow | undefined> {
  const [row] = await selectRows(
    tx,
    wholeRow,
    sql`SELECT r.id, r.number, l.name AS location, r.ticket_type AS "ticketType", r.opened_on AS "openedOn",
      r.ready_on AS "readyOn", r.closed_on AS "closedOn", r.picked_up_on AS "pickedUpOn", r.work_on AS "workOn",
      ${named('u', unitName)} AS unit, r.serial_text AS "serialText", r.unit_ref_text AS "unitRefText",
      ${named('m', modelName)} AS model,
      CASE WHEN k.id IS NULL THEN NULL
        ELSE json_build_object('ref', k.ref, 'name', k.name, 'phone', k.phone) END AS customer,
      r.engine_maker AS "engineMaker", r.engine_model AS "engineModel", r.engine_serial AS "engineSerial",
      r.meter_hours::float8 AS "meterHours", r.meter_fault AS "meterFault", r.complaint, r.cause, r.correction,
      r.notes, r.technician_text AS "technicianText", ${techniciansOf} AS technicians, r.pay_type AS "payType",
      r.labor_op AS "laborOp", r.labor_hours::float8 AS "laborHours", r.labor_amount_cents AS "laborAmountCents",
      ${partsCents} AS "partsAmountCents", ${totalCents} AS "totalCents"
    FROM repairs r
    LEFT JOIN locations l ON l.shop_id = r.shop_id AND l.id = r.location_id
    LEFT JOIN units u ON u.shop_id = r.shop_id AND u.id = r.unit_id
    LEFT JOIN models m ON m.shop_id = r.shop_id AND m.id = r.model_id
    LEFT JOIN customers k ON k.shop_id = r.shop_id AND k.id = r.customer_id
    WHERE r.id = ${id}`,
  );
  return row;
}

const lineRow = z.object({
  id: z.string(),
  position: z.number(),
  kind: z.enum(LINE_KINDS),
  part: namedColumn.nullable(),
  partNumber: z.string().nullable(),
  description: z.string().nullable(),
  supplier: z.string().nullable(),
  component: namedColumn.nullable(),
  componentOrigin: z.string(),
  reason: z.enum([...LINE_REASONS, 'unknown']),
  reasonOrigin: z.string(),
  workDone: z.enum(WORK_DONE).nullable(),
  quantity: z.number().nullable(),
  amountCents: z.number().nullable(),
  costCents: z.number().nullable(),
  laborOp: z.string().nullable(),
  laborHours: z.number().nullable(),
  laborAmountCents: z.number().nullable(),
  technician: z.string().nullable(),
  payType: z.enum(PAY_TYPES).nullable(),
});
export type RepairLineRow = z.output<typeof lineRow>;

export function findLines(tx: Transaction, repairId: string): Promise<RepairLineRow[]> {
  return selectRows(
    tx,
    lineRow,
    sql`SELECT x.id, x.position, x.kind, ${named('p', sql`p.number`)} AS part, x.part_number_text AS "partNumber",
      x.description, x.supplier, ${named('c', sql`c.name`)} AS component, x.component_origin AS "componentOrigin",
      x.reason, x.reason_origin AS "reasonOrigin", x.work_done AS "workDone", x.quantity::float8 AS quantity,
      x.amount_cents AS "amountCents", x.cost_cents AS "costCents", x.labor_op AS "laborOp",
      x.labor_hours::float8 AS "laborHours", x.labor_amount_cents AS "laborAmountCents",
      x.technician_text AS technician, x.pay_type AS "payType"
    FROM repair_lines x
    LEFT JOIN parts p ON p.shop_id = x.shop_id AND p.id = x.part_id
    LEFT JOIN components c ON c.shop_id = x.shop_id AND c.id = x.component_id
    WHERE x.repair_id = ${repairId} ORDER BY x.position, x.id`,
  );
}

const linkRow = z.object({
  direction: z.enum(['later', 'earlier']),
  id: z.string(),
  number: z.string(),
  workOn: z.string(),
  days: z.number(),
  evidence: z.string(),
});

/** The repairs that this one came back as, and the one that it is a return of. */
export function findLinks(tx: Transaction, repairId: string) {
  return selectRows(
    tx,
    linkRow,
    sql`SELECT CASE WHEN e.first_id = ${repairId} THEN 'later' ELSE 'earlier' END AS direction,
      o.id, o.number, o.work_on AS "workOn", ${daysOfReturn} AS days, e.evidence
    FROM ${effectiveComebacks} e
    JOIN repairs f ON f.id = e.first_id AND f.shop_id = current_shop_id()
    JOIN repairs s ON s.id = e.return_id AND s.shop_id = current_shop_id()
    JOIN repairs o ON o.shop_id = f.shop_id AND o.id = CASE WHEN e.first_id = ${repairId} THEN s.id ELSE f.id END
    WHERE e.is_counted AND (e.first_id = ${repairId} OR e.return_id = ${repairId})
    ORDER BY o.work_on, o.id`,
  );
}

export async function findVersions(tx: Transaction, repairId: string) {
  const rows = await selectRows(
    tx,
    z.object({ version: z.number(), replacedAt: z.string() }),
    sql`SELECT version, replaced_at AS "replacedAt" FROM repair_versions WHERE repair_id = ${repairId} ORDER BY version`,
  );
  return rows.map(({ version, replacedAt }) => ({ version, replacedAt: new Date(replacedAt).toISOString() }));
}
