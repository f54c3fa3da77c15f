import { and, desc, eq, gt, isNull, sql, type SQL } from 'drizzle-orm';
import { z } from 'zod';
import type { Database } from '../../db/client';
import { instantKey } from '../../db/instant-key';
import { sessions } from '../../db/schema/index';
import type { Deps } from '../../deps';
import { requireUser, type Actor } from '../../http/actor';
import { decodeCursor, pageOf } from '../../http/cursor';
import { missing } from '../../http/errors';
import { IDLE_HOURS } from '../../http/session-token';

const cursorKey = z.tuple([z.iso.datetime(), z.uuid()]);

/** The person's sessions that still open a door, the latest first. */
export async function listSessions(deps: Deps, actor: Actor, page: { limit: number; cursor?: string }) {
  const { userId, sessionId } = requireUser(actor);
  const now = deps.now();
  const after = decodeCursor(page.cursor, cursorKey);
  const rows = await deps.database
    .select({
      id: sessions.id,
      userAgent: sessions.userAgent,
      createdAt: sessions.createdAt,
      key: instantKey(sessions.createdAt),
      lastSeenAt: sessions.lastSeenAt,
    })
    .from(sessions)
    .where(
      and(
        eq(sessions.userId, userId),
        isNull(sessions.revokedAt),
        gt(sessions.expiresAt, now),
        gt(sessions.lastSeenAt, new Date(now.getTime() - IDLE_HOURS * 3_600_000)),
        after && sql`(${sessions.createdAt}, ${sessions.id}) < (${after[0]}::timestamptz, ${after[1]}::uuid)`,
      ),
    )
    .orderBy(desc(sessions.createdAt), desc(sessions.id))
    .limit(page.limit + 1);
  const { data, nextCursor } = pageOf(rows, page.limit, (row) => [row.key, row.id]);
  return {
    data: data.map((row) => ({
      id: row.id,
      isCurrent: row.id === sessionId,
      userAgent: row.userAgent,
      createdAt: row.createdAt.toISOString(),
      lastSeenAt: row.lastSeenAt.toISOString(),
    })),
    nextCursor,
  };
}

/** Ends the session that is asking, or another one of the same person. */
export async function endOneSession(deps: Deps, actor: Actor, id?: string): Promise<void> {
  const { userId, sessionId } = requireUser(actor);
  const ended = await endSessionsOf(deps.database, deps.now(), userId, eq(sessions.id, id ?? sessionId));
  if (ended === 0) throw missing('session');
}

export async function endEverySession(deps: Deps, actor: Actor): Promise<void> {
  await endSessionsOf(deps.database, deps.now(), requireUser(actor).userId);
}

/** Ends a person's sessions: all, or those that a condition picks. Answers how many. */
export async function endSessionsOf(
  database: Pick<Database, 'update'>,
  now: Date,
  userId: string,
  which?: SQL,
): Promise<number> {
  const ended = await database
    .update(sessions)
    .set({ revokedAt: now })
    .where(and(eq(sessions.userId, userId), isNull(sessions.revokedAt), which))
    .returning({ id: sessions.id });
  return ended.length;
}
