import { and, eq } from 'drizzle-orm';
import type pg from 'pg';
import type { ImportState } from '../../shared/imports';
import { imports } from '../db/schema/index';
import type { Deps } from '../deps';
import type { Actor } from '../http/actor';
import { audit } from '../http/audit';
import { conflict, type FieldError } from '../http/errors';
import { requestAnalysis } from '../jobs/request-analysis';
import { followCatalogue } from './follow-catalogue';
import { readImportIn } from './import-state';
import { HAS_MARK, NOTED_TABLES, type NotedTable } from './note-changes';
import { IMPORT, SHOP, waitForTurn, withImport } from './shop-transaction';
import { findReferences, nameRows } from './undo-references';

const LONGEST_WAIT_SECONDS = 30;
const MOST_LISTED = 200;

/**
 * Takes an import back: rows that it made go, rows that it changed are as before.
 * @throws conflict with the list where something later touched one of them; then all stays.
 */
export async function undoImport(deps: Deps, actor: Actor, importId: string): Promise<ImportState> {
  const { shopId } = actor;
  const state = await withImport(deps.database, { shopId, importId }, async ({ tx, client }) => {
    await waitForTurn(client, LONGEST_WAIT_SECONDS);
    const before = await readImportIn(tx, eq(imports.id, importId));
    if (before.status !== 'done' || before.isDryRun) {
      throw conflict(
        before.isDryRun
          ? 'A dry run took nothing in, so there is nothing to undo.'
          : `This import is ${before.status}; only one that is done can be undone.`,
      );
    }
    const errors = [...(await findTouched(client)), ...(await findAnswers(client))];
    if (errors.length === 0) {
      await restoreRepairs(client);
      for (const table of NOTED_TABLES) if (table !== 'repairs') await restoreRows(client, table);
      await followCatalogue(client);
      errors.push(...(await removeMade(client)));
    }
    if (errors.length > 0) {
      throw conflict(
        'Something later rests on what this import brought, so it stays as it is.',
        errors.slice(0, MOST_LISTED),
      );
    }
    const analysisRunId = await requestAnalysis(tx, deps, shopId);
    await tx
      .update(imports)
      .set({ status: 'undone', analysisRunId })
      .where(and(eq(imports.id, importId), eq(imports.status, 'done')));
    await audit(tx, actor, { action: 'undo', subject: 'import', subjectId: importId });
    return readImportIn(tx, eq(imports.id, importId));
  });
  deps.jobs.wake('analysis');
  return state;
}

const noted = (table: NotedTable, condition: string) =>
  `SELECT row_id FROM import_changes WHERE shop_id = ${SHOP} AND import_id = ${IMPORT} AND table_name = '${table}' AND ${condition}`;

/** Rows that a later import or a person changed since. */
async function findTouched(client: pg.PoolClient): Promise<FieldError[]> {
  const errors: FieldError[] = [];
  for (const table of NOTED_TABLES) {
    if (!HAS_MARK.has(table)) continue;
    const rows = await nameRows(
      client,
      table,
      `r.id IN (${noted(table, 'true')}) AND r.changed_by_import_id IS DISTINCT FROM ${IMPORT}`,
    );
    errors.push(
      ...rows.map(({ id, name }) => ({ path: `/${table}/${id}`, message: `${name} was changed later.` })),
    );
  }
  return errors;
}

/** Lines of its repairs on which a person has answered since what a part is or why it was changed. */
async function findAnswers(client: pg.PoolClient): Promise<FieldError[]> {
  const { rows } = await client.query<{ id: string; number: string }>(`
    SELECT DISTINCT r.id, r.number FROM repair_lines l JOIN repairs r ON r.shop_id = l.shop_id AND r.id = l.repair_id
    JOIN import_changes c ON c.shop_id = ${SHOP} AND c.import_id = ${IMPORT} AND c.table_name = 'repairs' AND c.row_id = r.id
    WHERE l.shop_id = ${SHOP} AND 'person' IN (l.component_origin, l.reason_origin) AND NOT EXISTS (
      SELECT FROM jsonb_array_elements(c.before -> 'lines') b
      WHERE b ->> 'id' = l.id::text AND (b ->> 'component_origin', b ->> 'reason_origin') = (l.component_origin, l.reason_origin))
    LIMIT ${MOST_LISTED}`);
  return rows.map(({ id, number }) => ({
    path: `/repairs/${id}`,
    message: `A person answered on a line of repair ${number}.`,
  }));
}

async function restoreRepairs(client: pg.PoolClient): Promise<void> {
  await restoreRows(client, 'repairs');
  const changed = `SELECT row_id, before FROM import_changes
    WHERE shop_id = ${SHOP} AND import_id = ${IMPORT} AND table_name = 'repairs' AND before IS NOT NULL`;
  await client.query(
    `DELETE FROM repair_lines l USING (${changed}) c WHERE l.shop_id = ${SHOP} AND l.repair_id = c.row_id`,
  );
  await client.query(
    `INSERT INTO repair_lines SELECT l.* FROM (${changed}) c, jsonb_populate_recordset(NULL::repair_lines, c.before -> 'lines') l`,
  );
  await client.query(
    `DELETE FROM repair_technicians k USING (${changed}) c WHERE k.shop_id = ${SHOP} AND k.repair_id = c.row_id`,
  );
  await client.query(`
    INSERT INTO repair_technicians (shop_id, repair_id, technician_id)
    SELECT ${SHOP}, c.row_id, t.id::uuid FROM (${changed}) c, jsonb_array_elements_text(c.before -> 'technicians') t(id)
    WHERE EXISTS (SELECT FROM technicians k WHERE k.shop_id = ${SHOP} AND k.id = t.id::uuid)`);
  await client.query(
    `DELETE FROM repair_versions WHERE shop_id = ${SHOP} AND replaced_by_import_id = ${IMPORT}`,
  );
}

async function restoreRows(client: pg.PoolClient, table: NotedTable): Promise<void> {
  const { rows } = await client.query<{ column_name: string }>(
    `SELECT column_name FROM information_schema.columns
     WHERE table_schema = 'public' AND table_name = $1 AND is_generated = 'NEVER' AND column_name NOT IN ('shop_id', 'id')`,
    [table],
  );
  const names = rows.map(({ column_name }) => column_name);
  await client.query(`
    UPDATE ${table} r SET ${names.map((name) => `${name} = b.${name}`).join(', ')}
    FROM import_changes c, jsonb_populate_record(NULL::${table}, c.before) b
    WHERE c.shop_id = ${SHOP} AND c.import_id = ${IMPORT} AND c.table_name = '${table}' AND c.before IS NOT NULL
      AND r.shop_id = ${SHOP} AND r.id = c.row_id`);
}

/** Removes what the import made, children first; answers what still refers to any of it. */
async function removeMade(client: pg.PoolClient): Promise<FieldError[]> {
  const errors: FieldError[] = [];
  for (const table of NOTED_TABLES) {
    const made = noted(table, 'before IS NULL');
    const references = await findReferences(client, table, made);
    errors.push(...references);
    if (references.length === 0)
      await client.query(`DELETE FROM ${table} WHERE shop_id = ${SHOP} AND id IN (${made})`);
    else break;
  }
  return errors;
}
