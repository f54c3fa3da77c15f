import type { Transaction } from '../db/client';
import { auditLog } from '../db/schema/index';
import type { Actor } from './actor';

/** Notes who did what, in the transaction that did it. */
export async function audit(
  tx: Transaction,
  actor: Actor,
  entry: { action: string; subject: string; subjectId?: string; detail?: unknown },
): Promise<void> {
  await tx.insert(auditLog).values({
    shopId: actor.shopId,
    userId: actor.kind === 'user' ? actor.userId : null,
    apiKeyId: actor.kind === 'key' ? actor.keyId : null,
    ...entry,
  });
}
