import bcrypt from 'bcrypt';
import { eq, sql } from 'drizzle-orm';
import { auditLog, users } from '../../db/schema/index';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import { membershipsOf } from '../../http/authenticate';
import { invalid } from '../../http/errors';
import { resetMessage } from '../../mail/messages';
import { queueMail } from '../../mail/queue-mail';
import { BCRYPT_COST } from '../session/service';
import { endSessionsOf } from '../session/sessions';
import { requireUncommonPassword } from './password-rules';
import { makePasswordLink, resetsInLastHour, usePasswordToken } from './tokens';

const RESETS_AN_HOUR = 3;

/** Mails a reset link where the address is somebody's; three in an hour at most. Says nothing of which it was. */
export async function sendReset(deps: Deps, email: string): Promise<void> {
  const [user] = await deps.database
    .select({ id: users.id, displayName: users.displayName })
    .from(users)
    .where(eq(users.email, email));
  // A mail belongs to a shop's outbox: the first shop of the person stands for all of them.
  const shop = user && (await membershipsOf(deps.database, user.id))[0];
  if (!shop) return;
  const wasQueued = await withShop(deps.database, shop.id, async (tx) => {
    // One after the other for one person, or two at a time would both see room for one more.
    await tx.execute(sql`SELECT FROM users WHERE id = ${user.id} FOR UPDATE`);
    if ((await resetsInLastHour(tx, user.id, deps.now())) >= RESETS_AN_HOUR) return false;
    const link = await makePasswordLink(tx, deps, user.id, 'reset');
    await queueMail(tx, deps, shop.id, {
      to: email,
      ...resetMessage({ displayName: user.displayName, link }),
    });
    await tx
      .insert(auditLog)
      .values({ shopId: shop.id, action: 'ask_reset', subject: 'password', subjectId: user.id });
    return true;
  });
  if (wasQueued) deps.jobs.wake('mail');
}

/**
 * Sets a password by a mailed link and signs the person out everywhere.
 * @throws invalid where the link is of no use, or the password too easy to guess; then the link still works.
 */
export async function setPasswordByLink(
  deps: Deps,
  { token, password }: { token: string; password: string },
) {
  const passwordHash = await bcrypt.hash(password, BCRYPT_COST);
  await deps.database.transaction(async (tx) => {
    const now = deps.now();
    const userId = await usePasswordToken(tx, token, now);
    const shops = userId ? await membershipsOf(tx, userId) : [];
    const [shop] = shops;
    if (!userId || !shop) {
      throw invalid('This link was used already, or is too old. Ask for a new one.', [
        { path: '/token', message: 'This link does not work any more.' },
      ]);
    }
    const [user] = await tx
      .update(users)
      .set({ passwordHash })
      .where(eq(users.id, userId))
      .returning({ email: users.email });
    requireUncommonPassword(password, {
      email: user?.email ?? '',
      shopNames: shops.map(({ name }) => name),
    });
    await endSessionsOf(tx, now, userId);
    await tx.execute(sql`SELECT set_config('app.shop_id', ${shop.id}, true)`);
    await tx
      .insert(auditLog)
      .values({ shopId: shop.id, userId, action: 'set', subject: 'password', subjectId: userId });
  });
}
