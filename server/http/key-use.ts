import { eq } from 'drizzle-orm';
import { apiKeys } from '../db/schema/index';
import { withShop } from '../db/tenancy';
import type { Deps } from '../deps';
import type { KeyActor } from './actor';

const NOTE_EVERY_MS = 60_000;

/** Notes when a key was last used, once a minute at most: a busy program must not write with every request. */
export function createKeyUse(deps: Deps): (actor: KeyActor) => Promise<void> {
  const notedAt = new Map<string, number>();
  return async ({ keyId, shopId }) => {
    const now = deps.now();
    const last = notedAt.get(keyId);
    if (last !== undefined && now.getTime() - last < NOTE_EVERY_MS) return;
    notedAt.set(keyId, now.getTime());
    await withShop(deps.database, shopId, (tx) =>
      tx.update(apiKeys).set({ lastUsedAt: now }).where(eq(apiKeys.id, keyId)),
    );
  };
}
