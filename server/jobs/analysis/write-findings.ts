import { sql } from 'drizzle-orm';
import type { CascadeFinding } from '../../../analytics/cascades/types';
import type { Transaction } from '../../db/client';
import type { ShopRecords } from './load-records';

/** Replaces the shop's findings; a pair that holds again keeps its id, so that links to it stay good. */
export async function writeFindings(
  tx: Transaction,
  findings: readonly CascadeFinding[],
  records: Pick<ShopRecords, 'components' | 'families'>,
): Promise<void> {
  const componentId = new Map(records.components.map(({ id, name }) => [name, id]));
  const familyId = new Map(records.families.map(({ id, name }) => [name, id]));
  const rows = findings.map((finding) => ({
    model_id: finding.model,
    family_id: finding.family === undefined ? null : (familyId.get(finding.family) ?? null),
    causal: componentId.get(finding.causal),
    resultant: componentId.get(finding.resultant),
    kind: finding.kind,
    q_value: finding.qValue,
    detail: finding,
  }));
  const asJson = JSON.stringify(rows);
  const incoming = sql`json_to_recordset(${asJson}::json) AS found(model_id uuid, family_id uuid, causal uuid,
    resultant uuid, kind text, q_value float8, detail jsonb)`;
  await tx.execute(sql`
    DELETE FROM findings f WHERE f.shop_id = current_shop_id() AND NOT EXISTS (
      SELECT FROM ${incoming}
      WHERE found.model_id IS NOT DISTINCT FROM f.model_id AND found.family_id IS NOT DISTINCT FROM f.family_id
        AND found.causal = f.causal_component_id AND found.resultant = f.resultant_component_id AND found.kind = f.kind)`);
  await tx.execute(sql`
    INSERT INTO findings (shop_id, model_id, family_id, causal_component_id, resultant_component_id, kind, q_value, detail)
    SELECT current_shop_id(), model_id, family_id, causal, resultant, kind, q_value, detail FROM ${incoming}
    ON CONFLICT (shop_id, model_id, family_id, causal_component_id, resultant_component_id, kind)
    DO UPDATE SET q_value = EXCLUDED.q_value, detail = EXCLUDED.detail`);
}
