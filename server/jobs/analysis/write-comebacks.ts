import { sql } from 'drizzle-orm';
import type { Comeback } from '../../../analytics/records/comeback-types';
import type { RepairFacts } from '../../../analytics/records/repair-facts';
import type { Transaction } from '../../db/client';

/** Replaces the shop's comebacks; what people said of them is kept elsewhere and not touched. */
export async function writeComebacks(tx: Transaction, comebacks: readonly Comeback[]): Promise<void> {
  const rows = comebacks.flatMap((comeback) =>
    comeback.returnRepairId === null
      ? []
      : [
          {
            return_id: comeback.returnRepairId,
            first_id: comeback.firstRepairId,
            episode_id: comeback.episodeRepairId,
            days: comeback.days,
            hours: comeback.hours,
            link: comeback.link,
            suggested_reason: comeback.suggestedReason,
            evidence: comeback.evidence,
            component_id: comeback.componentId,
          },
        ],
  );
  await tx.execute(sql`DELETE FROM comebacks WHERE shop_id = current_shop_id()`);
  await tx.execute(sql`
    INSERT INTO comebacks (shop_id, return_repair_id, first_repair_id, episode_repair_id, days, hours, link,
      suggested_reason, evidence, component_id)
    SELECT current_shop_id(), return_id, first_id, episode_id, days, hours, link, suggested_reason, evidence, component_id
    FROM json_to_recordset(${JSON.stringify(rows)}::json) AS back(return_id uuid, first_id uuid, episode_id uuid,
      days integer, hours numeric, link text, suggested_reason text, evidence text, component_id uuid)`);
}

/** Replaces what the repairs say about trouble: who counts in rates, and what was in trouble. */
export async function writeRepairFacts(tx: Transaction, facts: readonly RepairFacts[]): Promise<void> {
  const rows = facts.map(({ id, leftOut, troubleComponentIds, systemIds }) => ({
    repair_id: id,
    left_out: leftOut,
    trouble: troubleComponentIds,
    systems: systemIds,
  }));
  await tx.execute(sql`DELETE FROM repair_facts WHERE shop_id = current_shop_id()`);
  await tx.execute(sql`
    INSERT INTO repair_facts (shop_id, repair_id, left_out, trouble_component_ids, systems)
    SELECT current_shop_id(), repair_id, left_out, trouble, systems
    FROM json_to_recordset(${JSON.stringify(rows)}::json) AS fact(repair_id uuid, left_out text, trouble uuid[],
      systems text[])`);
}
