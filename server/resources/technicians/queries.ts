import { asc, eq, inArray, sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Transaction } from '../../db/client';
import { foldText } from '../../db/fold';
import { selectRows } from '../../db/rows';
import { technicianNames, technicians } from '../../db/schema/index';
import { namesIn } from '../../db/technician-names';

const columns = {
  id: technicians.id,
  displayName: technicians.displayName,
  userId: technicians.userId,
  leftOn: technicians.leftOn,
};

export const listTechnicianRows = (
  tx: Transaction,
  page: { after?: readonly [string, string]; limit: number },
) =>
  tx
    .select(columns)
    .from(technicians)
    .where(
      page.after &&
        sql`(${technicians.displayName}, ${technicians.id}) > (${page.after[0]}, ${page.after[1]}::uuid)`,
    )
    .orderBy(asc(technicians.displayName), asc(technicians.id))
    .limit(page.limit);

export const findTechnicianRow = (tx: Transaction, id: string) =>
  tx.select(columns).from(technicians).where(eq(technicians.id, id));

export const spellingsOf = (tx: Transaction, technicianIds: readonly string[]) =>
  tx
    .select({
      id: technicianNames.id,
      technicianId: technicianNames.technicianId,
      spelling: technicianNames.spelling,
      spellingKey: technicianNames.spellingKey,
      isConfirmed: sql<boolean>`${technicianNames.confirmedByUserId} IS NOT NULL`,
    })
    .from(technicianNames)
    .where(inArray(technicianNames.technicianId, [...technicianIds]))
    .orderBy(asc(technicianNames.spellingKey));

// A name stands on the repair or on a line of it.
const namedIn = sql`
  SELECT id AS repair_id, technician_text AS text FROM repairs WHERE technician_text IS NOT NULL
  UNION SELECT repair_id, technician_text FROM repair_lines WHERE technician_text IS NOT NULL`;

/** Every technician field that occurs, with the folded names in it; a shop has few, however many its repairs. */
async function namesByText(tx: Transaction) {
  const rows = await selectRows(
    tx,
    z.object({ text: z.string() }),
    sql`SELECT DISTINCT text FROM (${namedIn}) AS named`,
  );
  return rows.flatMap(({ text }) => namesIn(text).map((name) => ({ text, spellingKey: foldText(name) })));
}

export async function repairsBySpelling(tx: Transaction): Promise<Map<string, number>> {
  const pairs = await namesByText(tx);
  const rows = await selectRows(
    tx,
    z.object({ spelling_key: z.string(), repairs: z.number() }),
    sql`SELECT spelling_key, count(DISTINCT repair_id)::int AS repairs
      FROM (${namedIn}) AS named JOIN ${asTable(pairs)} USING (text) GROUP BY spelling_key`,
  );
  return new Map(rows.map((row) => [row.spelling_key, row.repairs]));
}

/** Writes anew who worked on the repairs that name a spelling, from what every spelling means now. */
export async function rewriteRepairTechnicians(tx: Transaction, shopId: string, spellingKey: string) {
  const pairs = await namesByText(tx);
  await tx.execute(sql`
    WITH named AS (${namedIn}),
      spelled AS (SELECT * FROM ${asTable(pairs)}),
      affected AS (SELECT DISTINCT repair_id FROM named JOIN spelled USING (text) WHERE spelling_key = ${spellingKey}),
      wanted AS (
        SELECT DISTINCT repair_id, n.technician_id
        FROM affected JOIN named USING (repair_id) JOIN spelled USING (text)
          JOIN technician_names n USING (spelling_key)),
      gone AS (
        DELETE FROM repair_technicians t USING affected a
        WHERE t.repair_id = a.repair_id AND NOT EXISTS (
          SELECT FROM wanted w WHERE w.repair_id = t.repair_id AND w.technician_id = t.technician_id))
    INSERT INTO repair_technicians (shop_id, repair_id, technician_id)
    SELECT ${shopId}::uuid, repair_id, technician_id FROM wanted ON CONFLICT DO NOTHING`);
}

/** Takes away a technician whom no record names any more; answers the person that they were. */
export async function removeIfUnnamed(tx: Transaction, id: string) {
  const rows = await selectRows(
    tx,
    z.object({ user_id: z.string().nullable() }),
    sql`DELETE FROM technicians t WHERE t.id = ${id}::uuid
      AND NOT EXISTS (SELECT FROM technician_names n WHERE n.technician_id = t.id)
      AND NOT EXISTS (SELECT FROM repair_technicians r WHERE r.technician_id = t.id)
      RETURNING user_id`,
  );
  return rows[0];
}

const asTable = (pairs: readonly { text: string; spellingKey: string }[]) => sql`unnest(
  ${sql.param(pairs.map(({ text }) => text))}::text[],
  ${sql.param(pairs.map(({ spellingKey }) => spellingKey))}::text[]) AS pairs (text, spelling_key)`;
