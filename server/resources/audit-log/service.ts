import { and, desc, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import { instantKey } from '../../db/instant-key';
import { apiKeys, auditLog, users } from '../../db/schema/index';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import type { Actor } from '../../http/actor';
import { decodeCursor, pageOf } from '../../http/cursor';

/** The latest first. `who` is a person, a key, or the service itself. */
export async function listAudit(deps: Deps, actor: Actor, page: { limit: number; cursor?: string }) {
  const after = decodeCursor(page.cursor, z.tuple([z.iso.datetime(), z.uuid()]));
  const rows = await withShop(deps.database, actor.shopId, (tx) =>
    tx
      .select({
        id: auditLog.id,
        at: auditLog.at,
        key: instantKey(auditLog.at),
        who: sql<string>`coalesce(${users.displayName}, 'Key ' || ${apiKeys.name}, 'Witness Mark')`,
        action: auditLog.action,
        subject: auditLog.subject,
        subjectId: auditLog.subjectId,
        detail: auditLog.detail,
      })
      .from(auditLog)
      .leftJoin(users, eq(users.id, auditLog.userId))
      .leftJoin(apiKeys, and(eq(apiKeys.shopId, auditLog.shopId), eq(apiKeys.id, auditLog.apiKeyId)))
      .where(after && sql`(${auditLog.at}, ${auditLog.id}) < (${after[0]}::timestamptz, ${after[1]}::uuid)`)
      .orderBy(desc(auditLog.at), desc(auditLog.id))
      .limit(page.limit + 1),
  );
  const { data, nextCursor } = pageOf(rows, page.limit, (row) => [row.key, row.id]);
  return {
    data: data.map(({ key: _key, at, ...entry }) => ({ ...entry, at: at.toISOString() })),
    nextCursor,
  };
}
