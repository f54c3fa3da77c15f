import { sql, type SQL } from 'drizzle-orm';
import { z } from 'zod';
import { COMEBACK_REASONS, COMEBACK_STATUSES, type comebackQuery } from '../../../shared/comebacks';
import { costOfReturn } from '../../db/comeback-cost';
import type { Transaction } from '../../db/client';
import { daysOfReturn, effectiveComebacks, returnedOn } from '../../db/effective-comebacks';
import { allOf, modelName, namedColumn, selectRows, unitName } from '../../db/rows';

const comebackRow = z.object({
  id: z.string(),
  repairNumber: z.string(),
  firstRepairNumber: z.string(),
  episodeRepairNumber: z.string(),
  repairId: z.string(),
  firstRepairId: z.string(),
  episodeRepairId: z.string(),
  unit: namedColumn,
  model: namedColumn.nullable(),
  component: namedColumn.nullable(),
  technicians: z.array(namedColumn),
  firstWorkOn: z.string(),
  returnedOn: z.string(),
  days: z.number(),
  hours: z.number().nullable(),
  complaint: z.string().nullable(),
  link: z.string(),
  suggestedReason: z.enum(COMEBACK_REASONS),
  evidence: z.string(),
  reason: z.enum(COMEBACK_REASONS).nullable(),
  isOurs: z.boolean(),
  status: z.enum(COMEBACK_STATUSES),
  note: z.string(),
  decidedBy: z.string().nullable(),
  decidedAt: z.string().nullable(),
  costCents: z.number(),
});
export type ComebackRow = z.output<typeof comebackRow>;

type Filter = Partial<Omit<z.output<typeof comebackQuery>, 'limit' | 'cursor'>>;

/** On aliases e (effective) and f (the first repair). `ownTechnicianId` narrows to that person's own work. */
export function comebackConditions(filter: Filter, ownTechnicianId?: string | null): SQL {
  const ofTechnician = (id: string) =>
    sql`f.id IN (SELECT repair_id FROM repair_technicians WHERE technician_id = ${id})`;
  return allOf([
    filter.from ? sql`f.work_on >= ${filter.from}` : undefined,
    filter.to ? sql`f.work_on <= ${filter.to}` : undefined,
    filter.status ? sql`e.status = ${filter.status}` : undefined,
    filter.modelId ? sql`f.model_id = ${filter.modelId}` : undefined,
    filter.componentId ? sql`e.component_id = ${filter.componentId}` : undefined,
    filter.technicianId ? ofTechnician(filter.technicianId) : undefined,
    ownTechnicianId ? ofTechnician(ownTechnicianId) : ownTechnicianId === null ? sql`false` : undefined,
  ]);
}

/** One page, the newest first work first. The head of an episode is where the chain of attachments ends. */
export function findComebacks(
  tx: Transaction,
  conditions: SQL,
  options: { after?: readonly [string, string] | undefined; rows: number; doorRateCents: number },
): Promise<ComebackRow[]> {
  const after = options.after
    ? sql`AND (f.work_on, e.return_id) < (${options.after[0]}::date, ${options.after[1]}::uuid)`
    : sql.empty();
  return selectRows(
    tx,
    comebackRow,
    sql`WITH RECURSIVE page AS MATERIALIZED (
      SELECT e.*, f.shop_id FROM ${effectiveComebacks} e
      JOIN repairs f ON f.id = e.first_id AND f.shop_id = current_shop_id()
      WHERE ${conditions} ${after}
      ORDER BY f.work_on DESC, e.return_id DESC LIMIT ${options.rows}
    ), chain AS (
      SELECT p.return_id, p.first_id AS at_id, 1 AS length FROM page p
      UNION ALL
      SELECT c.return_id, e.first_id, c.length + 1 FROM chain c
      JOIN ${effectiveComebacks} e ON e.return_id = c.at_id AND e.status <> 'dismissed'
      WHERE c.length < 100
    ), heads AS (
      SELECT DISTINCT ON (return_id) return_id, at_id AS id FROM chain ORDER BY return_id, length DESC
    )
    SELECT e.return_id AS id, s.number AS "repairNumber", f.number AS "firstRepairNumber",
      h.number AS "episodeRepairNumber", s.id AS "repairId", f.id AS "firstRepairId", h.id AS "episodeRepairId",
      json_build_object('id', coalesce(u.id, s.id), 'name', ${unitName}) AS unit,
      CASE WHEN m.id IS NULL THEN NULL ELSE json_build_object('id', m.id, 'name', ${modelName}) END AS model,
      CASE WHEN c.id IS NULL THEN NULL ELSE json_build_object('id', c.id, 'name', c.name) END AS component,
      (SELECT coalesce(json_agg(json_build_object('id', t.id, 'name', t.display_name) ORDER BY t.display_name), '[]')
        FROM repair_technicians rt JOIN technicians t ON t.shop_id = rt.shop_id AND t.id = rt.technician_id
        WHERE rt.shop_id = f.shop_id AND rt.repair_id = f.id) AS technicians,
      f.work_on AS "firstWorkOn", ${returnedOn} AS "returnedOn", ${daysOfReturn} AS days,
      CASE WHEN e.days IS NOT NULL THEN e.hours
        WHEN f.meter_fault IS NULL AND s.meter_fault IS NULL AND s.meter_hours >= f.meter_hours
        THEN (s.meter_hours - f.meter_hours)::float8 END AS hours,
      s.complaint, e.link, e.suggested_reason AS "suggestedReason", e.evidence, e.reason, e.is_ours AS "isOurs",
      e.status, coalesce(e.note, '') AS note, w.display_name AS "decidedBy", e.decided_at AS "decidedAt",
      ${costOfReturn(options.doorRateCents)} AS "costCents"
    FROM page e
    JOIN repairs f ON f.shop_id = e.shop_id AND f.id = e.first_id
    JOIN repairs s ON s.shop_id = e.shop_id AND s.id = e.return_id
    JOIN heads g ON g.return_id = e.return_id
    JOIN repairs h ON h.shop_id = e.shop_id AND h.id = g.id
    LEFT JOIN units u ON u.shop_id = f.shop_id AND u.id = f.unit_id
    LEFT JOIN models m ON m.shop_id = f.shop_id AND m.id = f.model_id
    LEFT JOIN components c ON c.shop_id = f.shop_id AND c.id = e.component_id
    LEFT JOIN users w ON w.id = e.decided_by_user_id
    ORDER BY f.work_on DESC, e.return_id DESC`,
  );
}

const visitRow = z.object({ id: z.string(), unitId: z.string().nullable(), openedOn: z.string() });

export async function findVisit(tx: Transaction, id: string) {
  const [row] = await selectRows(
    tx,
    visitRow,
    sql`SELECT id, unit_id AS "unitId", coalesce(opened_on, work_on) AS "openedOn" FROM repairs WHERE id = ${id}`,
  );
  return row;
}

/** Whether the chain of attachments from one repair comes by another. */
export async function leadsBack(tx: Transaction, fromId: string, toId: string): Promise<boolean> {
  const { rows } = await tx.execute(sql`
    WITH RECURSIVE chain AS (
      SELECT ${fromId}::uuid AS id, 1 AS length
      UNION ALL
      SELECT coalesce(d.attached_to_repair_id, c.first_repair_id), chain.length + 1 FROM chain
      JOIN repairs r ON r.id = chain.id AND r.shop_id = current_shop_id()
      LEFT JOIN comebacks c ON c.shop_id = r.shop_id AND c.return_repair_id = r.id
      LEFT JOIN comeback_decisions d ON d.shop_id = r.shop_id AND d.return_repair_id = r.id
      WHERE chain.length < 100 AND coalesce(d.attached_to_repair_id, c.first_repair_id) IS NOT NULL
    ) SELECT 1 FROM chain WHERE id = ${toId} LIMIT 1`);
  return rows.length > 0;
}
