import { sql, type SQL } from 'drizzle-orm';
import { NOT_COUNTED, OURS } from '../../shared/comebacks';

const listed = (values: readonly string[]) =>
  sql.join(
    values.map((value) => sql`${value}`),
    sql`, `,
  );

/**
 * Every return as the computation and people's decisions together make it, to be used as a table: the decision's
 * word on status, reason and attachment goes before the computed one, from the moment it is written.
 * `days` and `hours` are null where a person attached it elsewhere; they then follow from the two repairs.
 */
const effective = sql`(
  SELECT c.return_repair_id AS return_id,
    coalesce(d.attached_to_repair_id, c.first_repair_id) AS first_id,
    coalesce(d.status, 'suggested') AS status, d.reason, c.suggested_reason, c.evidence, c.component_id,
    CASE WHEN d.attached_to_repair_id <> c.first_repair_id THEN 'person' ELSE c.link END AS link,
    CASE WHEN d.attached_to_repair_id <> c.first_repair_id THEN NULL ELSE c.days END AS days,
    CASE WHEN d.attached_to_repair_id <> c.first_repair_id THEN NULL ELSE c.hours::float8 END AS hours,
    d.is_ours AS said_ours, d.note, d.decided_by_user_id, d.decided_at
  FROM comebacks c
  LEFT JOIN comeback_decisions d ON d.shop_id = c.shop_id AND d.return_repair_id = c.return_repair_id
  UNION ALL
  SELECT d.return_repair_id, d.attached_to_repair_id, d.status, d.reason, 'undetermined', 'A person says so.', NULL,
    'person', NULL, NULL, d.is_ours, d.note, d.decided_by_user_id, d.decided_at
  FROM comeback_decisions d
  WHERE d.attached_to_repair_id IS NOT NULL AND NOT EXISTS (
    SELECT FROM comebacks c WHERE c.shop_id = d.shop_id AND c.return_repair_id = d.return_repair_id)
)`;

/** Effective returns with `is_counted` (the same trouble) and `is_ours` (confirmed as the shop's doing). */
export const effectiveComebacks: SQL = sql`(
  SELECT e.*,
    e.status <> 'dismissed' AND coalesce(e.reason, e.suggested_reason) NOT IN (${listed(NOT_COUNTED)}) AS is_counted,
    e.status = 'confirmed' AND (coalesce(e.reason, e.suggested_reason) IN (${listed(OURS)})
      OR coalesce(e.reason, e.suggested_reason) = 'part_failed_again' AND coalesce(e.said_ours, false)) AS is_ours
  FROM ${effective} e
)`;

/** The day that the machine was back; needs alias s (the return). */
export const returnedOn = sql`coalesce(s.opened_on, s.work_on)`;

/** Days of a return, 0 where it came in before the work was closed; needs aliases e (effective), f (first) and s. */
export const daysOfReturn = sql`coalesce(e.days, greatest(0, ${returnedOn} - f.work_on))`;
