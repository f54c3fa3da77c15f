import { sql, type SQL } from 'drizzle-orm';
import type { z } from 'zod';
import type { repairQuery } from '../../../shared/repairs';
import { effectiveComebacks } from '../../db/effective-comebacks';
import { foldText } from '../../db/fold';
import { allOf, anywhere } from '../../db/rows';

export type RepairFilter = Omit<z.output<typeof repairQuery>, 'limit' | 'cursor'>;

/** The conditions of a repair list on alias r. Programs search no customers. */
export function repairConditions(filter: RepairFilter, options: { searchesCustomers: boolean }): SQL {
  const { q, serial, number, maker, model, modelId, unitId, componentId, technicianId, from, to } = filter;
  const cameBack = sql`r.id IN (SELECT e.first_id FROM ${effectiveComebacks} e WHERE e.is_counted)`;
  return allOf([
    q?.trim() ? textCondition(q, options.searchesCustomers) : undefined,
    serial ? sql`r.unit_id IN (SELECT id FROM units WHERE serial_key = ${foldText(serial)})` : undefined,
    number ? sql`r.number_key = ${foldText(number)}` : undefined,
    maker ? sql`r.model_id IN (SELECT id FROM models WHERE maker_key = ${foldText(maker)})` : undefined,
    model ? sql`r.model_id IN (SELECT id FROM models WHERE model_key = ${foldText(model)})` : undefined,
    modelId ? sql`r.model_id = ${modelId}` : undefined,
    unitId ? sql`r.unit_id = ${unitId}` : undefined,
    componentId
      ? sql`r.id IN (SELECT repair_id FROM repair_lines WHERE component_id = ${componentId})`
      : undefined,
    technicianId
      ? sql`r.id IN (SELECT repair_id FROM repair_technicians WHERE technician_id = ${technicianId})`
      : undefined,
    from ? sql`r.work_on >= ${from}` : undefined,
    to ? sql`r.work_on <= ${to}` : undefined,
    filter.cameBack === 'yes' ? cameBack : undefined,
    filter.cameBack === 'no' ? sql`NOT (${cameBack})` : undefined,
  ]);
}

/**
 * What people type into the one box: a number, serial, tag, name, phone, or words of the complaint. Folded and compared
 * once for all texts of a row, since every row may have to be looked at.
 */
function textCondition(q: string, searchesCustomers: boolean): SQL {
  const pattern = anywhere(q);
  const holdsIt = (...texts: SQL[]) =>
    sql`lower(concat_ws(chr(10), ${sql.join(texts, sql`, `)})) LIKE lower(${pattern})`;
  const digits = q.replace(/\D/g, '');
  const phone =
    digits.length >= 4 ? sql`OR regexp_replace(phone, '\\D', '', 'g') LIKE ${`%${digits}%`}` : sql.empty();
  const customer = sql`OR r.customer_id IN (SELECT id FROM customers WHERE name ILIKE ${pattern} ${phone})`;
  return sql`(${holdsIt(sql`r.number`, sql`r.complaint`, sql`r.serial_text`, sql`r.unit_ref_text`)}
    OR r.unit_id IN (SELECT id FROM units WHERE ${holdsIt(sql`serial`, sql`unit_ref`)})
    ${searchesCustomers ? customer : sql.empty()})`;
}
