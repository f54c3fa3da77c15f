import { desc, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import type { createApiKey } from '../../../shared/administration';
import type { KeyScope } from '../../../shared/roles';
import { instantKey } from '../../db/instant-key';
import { apiKeys } from '../../db/schema/index';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import type { Actor } from '../../http/actor';
import { newApiKey } from '../../http/api-key';
import { audit } from '../../http/audit';
import { decodeCursor, pageOf } from '../../http/cursor';
import { missing } from '../../http/errors';

const columns = {
  id: apiKeys.id,
  name: apiKeys.name,
  hint: apiKeys.keyHint,
  mayImport: apiKeys.mayImport,
  mayRead: apiKeys.mayRead,
  createdAt: apiKeys.createdAt,
  lastUsedAt: apiKeys.lastUsedAt,
  revokedAt: apiKeys.revokedAt,
};

type KeyRow = {
  id: string;
  name: string;
  hint: string;
  mayImport: boolean;
  mayRead: boolean;
  createdAt: Date;
  lastUsedAt: Date | null;
  revokedAt: Date | null;
};

/** The latest first; revoked ones too, because the audit names them. */
export async function listKeys(deps: Deps, actor: Actor, page: { limit: number; cursor?: string }) {
  const after = decodeCursor(page.cursor, z.tuple([z.iso.datetime(), z.uuid()]));
  const rows = await withShop(deps.database, actor.shopId, (tx) =>
    tx
      .select({ ...columns, key: instantKey(apiKeys.createdAt) })
      .from(apiKeys)
      .where(
        after && sql`(${apiKeys.createdAt}, ${apiKeys.id}) < (${after[0]}::timestamptz, ${after[1]}::uuid)`,
      )
      .orderBy(desc(apiKeys.createdAt), desc(apiKeys.id))
      .limit(page.limit + 1),
  );
  const { data, nextCursor } = pageOf(rows, page.limit, (row) => [row.key, row.id]);
  return { data: data.map(presentKey), nextCursor };
}

export async function createKey(deps: Deps, actor: Actor, wanted: z.infer<typeof createApiKey>) {
  const { key, stored } = newApiKey(wanted.scopes);
  const row = await withShop(deps.database, actor.shopId, async (tx) => {
    const [created] = await tx
      .insert(apiKeys)
      .values({ shopId: actor.shopId, name: wanted.name, ...stored })
      .returning(columns);
    if (!created) throw new Error('no key row');
    await audit(tx, actor, {
      action: 'create',
      subject: 'key',
      subjectId: created.id,
      detail: { name: wanted.name, scopes: wanted.scopes },
    });
    return created;
  });
  return { ...presentKey(row), key };
}

export async function revokeKey(deps: Deps, actor: Actor, id: string): Promise<void> {
  await withShop(deps.database, actor.shopId, async (tx) => {
    const revoked = await tx
      .update(apiKeys)
      .set({ revokedAt: sql`coalesce(${apiKeys.revokedAt}, ${deps.now().toISOString()}::timestamptz)` })
      .where(eq(apiKeys.id, id))
      .returning({ name: apiKeys.name });
    if (!revoked[0]) throw missing('key');
    await audit(tx, actor, { action: 'revoke', subject: 'key', subjectId: id, detail: revoked[0] });
  });
}

function presentKey(row: KeyRow) {
  const scopes: KeyScope[] = [];
  if (row.mayImport) scopes.push('import');
  if (row.mayRead) scopes.push('read');
  return {
    id: row.id,
    name: row.name,
    hint: row.hint,
    scopes,
    createdAt: row.createdAt.toISOString(),
    lastUsedAt: row.lastUsedAt?.toISOString() ?? null,
    isRevoked: row.revokedAt !== null,
  };
}
