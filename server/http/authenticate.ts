import { and, eq, gt, isNull, sql } from 'drizzle-orm';
import type { Request, RequestHandler } from 'express';
import { createHash } from 'node:crypto';
import { z } from 'zod';
import type { KeyScope, Role } from '../../shared/roles';
import type { Database } from '../db/client';
import { sessions } from '../db/schema/index';
import type { Deps } from '../deps';
import type { Actor, KeyActor } from './actor';
import { AppError } from './errors';
import { createKeyUse } from './key-use';
import { IDLE_HOURS, readSessionToken, SESSION_COOKIE, setSessionCookie } from './session-token';

const RENEW_AFTER_SECONDS = 60;

export const hashSecret = (secret: string) => createHash('sha256').update(secret).digest('hex');

/** Puts the actor on the request where a key or a session says who it is; routes decide whether they need one. */
export function authenticate(deps: Deps): RequestHandler {
  const noteKeyUse = createKeyUse(deps);
  return async (request, response, next) => {
    const header = request.get('authorization');
    if (header !== undefined) {
      const actor = await actorOfKey(deps, header);
      await noteKeyUse(actor);
      request.actor = actor;
      return next();
    }
    const cookies = z.record(z.string(), z.string()).catch({}).parse(request.cookies);
    const token = cookies[SESSION_COOKIE];
    const sessionId = token && readSessionToken(token, deps.sessionSecret, deps.now());
    if (!sessionId) return next();
    const found = await actorOfSession(deps, sessionId);
    if (found) {
      request.actor = found.actor;
      if (found.wasRenewed) setSessionCookie(response, { id: sessionId, expiresAt: found.expiresAt }, deps);
    }
    next();
  };
}

/** Browsers say where an unsafe request comes from; one that comes from another site is refused. */
export function refuseForeignOrigin(deps: Deps): RequestHandler {
  return (request, _response, next) => {
    if (['GET', 'HEAD', 'OPTIONS'].includes(request.method) || request.get('authorization') !== undefined)
      return next();
    const site = request.get('sec-fetch-site');
    const origin = request.get('origin');
    const isForeign =
      (site !== undefined && !['same-origin', 'none'].includes(site)) ||
      (origin !== undefined && !isOwnOrigin(origin, request, deps));
    if (isForeign) throw new AppError('forbidden', 'This request comes from another site.');
    next();
  };
}

function isOwnOrigin(origin: string, request: Request, deps: Deps): boolean {
  if (origin === new URL(deps.config.publicUrl).origin) return true;
  return origin === `${request.protocol}://${request.get('host')}`;
}

async function actorOfKey(deps: Deps, header: string): Promise<KeyActor> {
  const key = /^Bearer\s+(\S+)$/i.exec(header)?.[1];
  const found = key && (await findKey(deps.database, key));
  if (!found) throw new AppError('unauthenticated', 'This key is not known, or was revoked.');
  return found;
}

const keyRow = z.object({
  shop_id: z.string(),
  id: z.string(),
  may_import: z.boolean(),
  may_read: z.boolean(),
});

async function findKey(database: Database, key: string): Promise<KeyActor | undefined> {
  const { rows } = await database.execute(sql`SELECT * FROM api_key_by_hash(${hashSecret(key)})`);
  const row = rows[0] && keyRow.parse(rows[0]);
  if (!row) return undefined;
  const scopes: KeyScope[] = [
    ...(row.may_read ? (['read'] as const) : []),
    ...(row.may_import ? (['import'] as const) : []),
  ];
  return { kind: 'key', keyId: row.id, shopId: row.shop_id, scopes };
}

const membershipRow = z.object({ shop_id: z.string(), shop_name: z.string(), role: z.custom<Role>() });

/** The shops a person belongs to; asked before any shop is known. */
export async function membershipsOf(database: Pick<Database, 'execute'>, userId: string) {
  const { rows } = await database.execute(sql`SELECT * FROM memberships_of_user(${userId})`);
  return z
    .array(membershipRow)
    .parse(rows)
    .map((row) => ({ id: row.shop_id, name: row.shop_name, role: row.role }));
}

async function actorOfSession(deps: Deps, sessionId: string) {
  const now = deps.now();
  const idleSince = new Date(now.getTime() - IDLE_HOURS * 3_600_000);
  const [session] = await deps.database
    .select({
      userId: sessions.userId,
      shopId: sessions.shopId,
      lastSeenAt: sessions.lastSeenAt,
      expiresAt: sessions.expiresAt,
    })
    .from(sessions)
    .where(
      and(
        eq(sessions.id, sessionId),
        isNull(sessions.revokedAt),
        gt(sessions.expiresAt, now),
        gt(sessions.lastSeenAt, idleSince),
      ),
    );
  if (!session) return undefined;
  const membership = (await membershipsOf(deps.database, session.userId)).find(
    (shop) => shop.id === session.shopId,
  );
  if (!membership) return undefined;
  const wasRenewed = now.getTime() - session.lastSeenAt.getTime() > RENEW_AFTER_SECONDS * 1000;
  if (wasRenewed)
    await deps.database.update(sessions).set({ lastSeenAt: now }).where(eq(sessions.id, sessionId));
  const actor: Actor = {
    kind: 'user',
    userId: session.userId,
    sessionId,
    shopId: membership.id,
    role: membership.role,
  };
  return { actor, wasRenewed, expiresAt: session.expiresAt };
}
