import { TZDate } from '@date-fns/tz';
import bcrypt from 'bcrypt';
import { format } from 'date-fns';
import { eq } from 'drizzle-orm';
import type { Session } from '../../../shared/session';
import { sessions, shops, users } from '../../db/schema/index';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import { requireUser, type Actor } from '../../http/actor';
import { membershipsOf } from '../../http/authenticate';
import { missing } from '../../http/errors';
import { LONGEST_DAYS } from '../../http/session-token';
import { endOneSession } from './sessions';

export const BCRYPT_COST = 11;
// Compared where there is no such person, so that the answer takes as long either way.
const NOBODY = bcrypt.hashSync('nobody has this password', BCRYPT_COST);

/** The person whom an e-mail and password name, with the first of their shops; undefined whatever was wrong. */
export async function findPerson(deps: Deps, credentials: { email: string; password: string }) {
  const [user] = await deps.database
    .select({ id: users.id, passwordHash: users.passwordHash })
    .from(users)
    .where(eq(users.email, credentials.email));
  const isRight = await bcrypt.compare(credentials.password, user?.passwordHash ?? NOBODY);
  const shop = user?.passwordHash && isRight ? (await membershipsOf(deps.database, user.id))[0] : undefined;
  return user && shop && { userId: user.id, shopId: shop.id };
}

/** Opens a new session; the one that the same browser had before ends. */
export async function openSession(
  deps: Deps,
  { userId, shopId }: { userId: string; shopId: string },
  { userAgent, replaces }: { userAgent: string; replaces: Actor | undefined },
) {
  const now = deps.now();
  const expiresAt = new Date(now.getTime() + LONGEST_DAYS * 86_400_000);
  const [opened] = await deps.database
    .insert(sessions)
    .values({
      userId,
      shopId,
      createdAt: now,
      lastSeenAt: now,
      expiresAt,
      userAgent: userAgent.slice(0, 300),
    })
    .returning({ id: sessions.id });
  if (!opened) throw new Error('no session row');
  if (replaces) await endOneSession(deps, replaces);
  return { session: { id: opened.id, expiresAt }, answer: await describe(deps, userId, shopId) };
}

export function describeSession(deps: Deps, actor: Actor): Promise<Session> {
  const { userId, shopId } = requireUser(actor);
  return describe(deps, userId, shopId);
}

export async function changeSessionShop(deps: Deps, actor: Actor, shopId: string): Promise<Session> {
  const { userId, sessionId } = requireUser(actor);
  const shop = (await membershipsOf(deps.database, userId)).find(({ id }) => id === shopId);
  if (!shop) throw missing('shop');
  await deps.database.update(sessions).set({ shopId }).where(eq(sessions.id, sessionId));
  return describe(deps, userId, shopId);
}

async function describe(deps: Deps, userId: string, shopId: string): Promise<Session> {
  const memberships = await membershipsOf(deps.database, userId);
  const role = memberships.find(({ id }) => id === shopId)?.role;
  const [user] = await deps.database
    .select({ id: users.id, email: users.email, displayName: users.displayName })
    .from(users)
    .where(eq(users.id, userId));
  const [shop] = await withShop(deps.database, shopId, (tx) =>
    tx
      .select({
        id: shops.id,
        name: shops.name,
        timeZone: shops.timeZone,
        locale: shops.locale,
        currency: shops.currency,
        windowDays: shops.windowDays,
      })
      .from(shops),
  );
  if (!user || !shop || !role) throw missing('session');
  return { user, shop: { ...shop, role, today: todayIn(shop.timeZone, deps.now()) }, shops: memberships };
}

/** The business date at an instant, in a shop's zone. */
export function todayIn(timeZone: string, now: Date): string {
  return format(new TZDate(now, timeZone), 'yyyy-MM-dd');
}
