import { and, eq } from 'drizzle-orm';
import { batchAnswer, type BatchAnswer } from '../../../shared/imports';
import type { Transaction } from '../../db/client';
import { idempotencyKeys } from '../../db/schema/index';
import { AppError, conflict } from '../../http/errors';

/** A claim this old was left by a process that ended early. */
const ABANDONED_AFTER_MS = 15 * 60_000;

type Claim = { shopId: string; key: string; fingerprint: string; now: Date };

/**
 * Claims a key for what is being sent; answers what was answered before to the same.
 * @throws reused where the key came with other content, conflict while the first is at work.
 */
export async function claimKey(
  tx: Transaction,
  { shopId, key, fingerprint, now }: Claim,
): Promise<BatchAnswer | undefined> {
  const claimed = await tx
    .insert(idempotencyKeys)
    .values({ shopId, key, fingerprint, createdAt: now })
    .onConflictDoNothing()
    .returning({ key: idempotencyKeys.key });
  if (claimed.length === 1) return undefined;
  const [held] = await tx.select().from(idempotencyKeys).where(eq(idempotencyKeys.key, key)).for('update');
  if (!held) throw conflict('A request with this Idempotency-Key has just ended. Send it again.');
  if (held.fingerprint !== fingerprint)
    throw new AppError('reused', 'This Idempotency-Key was used for other content.');
  if (held.answer !== null) return batchAnswer.parse(held.answer);
  if (now.getTime() - held.createdAt.getTime() < ABANDONED_AFTER_MS) {
    throw conflict('The request with this Idempotency-Key is still at work. Ask again in a moment.');
  }
  await tx.update(idempotencyKeys).set({ createdAt: now }).where(eq(idempotencyKeys.key, key));
  return undefined;
}

export async function keepAnswer(tx: Transaction, key: string, answer: BatchAnswer): Promise<void> {
  await tx.update(idempotencyKeys).set({ answer }).where(eq(idempotencyKeys.key, key));
}

/** Lets the same request be sent again after it failed. */
export async function releaseKey(tx: Transaction, key: string, fingerprint: string): Promise<void> {
  await tx
    .delete(idempotencyKeys)
    .where(and(eq(idempotencyKeys.key, key), eq(idempotencyKeys.fingerprint, fingerprint)));
}
