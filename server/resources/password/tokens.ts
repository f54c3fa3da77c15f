import { and, eq, gt, isNull, sql } from 'drizzle-orm';
import { randomUUID } from 'node:crypto';
import type { Transaction } from '../../db/client';
import { passwordTokens } from '../../db/schema/index';
import type { Deps } from '../../deps';
import { hashSecret } from '../../http/authenticate';
import { passwordTokenOf, placeForLink } from '../../mail/password-link';

const LIFE_HOURS = { reset: 1, invite: 7 * 24 } as const;

/** Makes a link for one person to choose a password; answers what stands for it in the text of a mail. */
export async function makePasswordLink(
  tx: Transaction,
  deps: Pick<Deps, 'now' | 'sessionSecret'>,
  userId: string,
  purpose: keyof typeof LIFE_HOURS,
): Promise<string> {
  const id = randomUUID();
  const createdAt = deps.now();
  await tx.insert(passwordTokens).values({
    id,
    userId,
    purpose,
    tokenHash: hashSecret(passwordTokenOf(id, deps.sessionSecret)),
    createdAt,
    expiresAt: new Date(createdAt.getTime() + LIFE_HOURS[purpose] * 3_600_000),
  });
  return placeForLink(id);
}

/** Uses a link up, and with it every other one of the person; undefined where it is unknown, used or too old. */
export async function usePasswordToken(
  tx: Transaction,
  token: string,
  now: Date,
): Promise<string | undefined> {
  const [used] = await tx
    .update(passwordTokens)
    .set({ usedAt: now })
    .where(
      and(
        eq(passwordTokens.tokenHash, hashSecret(token)),
        isNull(passwordTokens.usedAt),
        gt(passwordTokens.expiresAt, now),
      ),
    )
    .returning({ userId: passwordTokens.userId });
  if (!used) return undefined;
  await tx
    .update(passwordTokens)
    .set({ usedAt: now })
    .where(and(eq(passwordTokens.userId, used.userId), isNull(passwordTokens.usedAt)));
  return used.userId;
}

/** How many reset links a person was sent in the last hour. */
export async function resetsInLastHour(tx: Transaction, userId: string, now: Date): Promise<number> {
  const [row] = await tx
    .select({ count: sql<number>`count(*)::int` })
    .from(passwordTokens)
    .where(
      and(
        eq(passwordTokens.userId, userId),
        eq(passwordTokens.purpose, 'reset'),
        gt(passwordTokens.createdAt, new Date(now.getTime() - 3_600_000)),
      ),
    );
  return row?.count ?? 0;
}
