import { eq } from 'drizzle-orm';
import type { z } from 'zod';
import type { inviteMember, Member } from '../../../shared/administration';
import type { Transaction } from '../../db/client';
import { memberships, shops, users } from '../../db/schema/index';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import type { Actor } from '../../http/actor';
import { audit } from '../../http/audit';
import { conflict, missing } from '../../http/errors';
import { addedMessage, inviteMessage } from '../../mail/messages';
import { queueMail } from '../../mail/queue-mail';
import { makePasswordLink } from '../password/tokens';
import { presentMember } from './present';
import { findMember } from './queries';

/** Adds a person to the shop by e-mail, whom another shop may know already, and mails them. */
export async function invite(
  deps: Deps,
  actor: Actor,
  wanted: z.infer<typeof inviteMember>,
): Promise<Member> {
  const member = await withShop(deps.database, actor.shopId, async (tx) => {
    await tx
      .insert(users)
      .values({ email: wanted.email, displayName: wanted.displayName })
      .onConflictDoNothing();
    const [user] = await tx.select({ id: users.id }).from(users).where(eq(users.email, wanted.email));
    if (!user) throw new Error('no user row');
    const [added] = await tx
      .insert(memberships)
      .values({ shopId: actor.shopId, userId: user.id, role: wanted.role })
      .onConflictDoNothing()
      .returning({ id: memberships.id });
    if (!added) {
      throw conflict('This person is in the shop already.', [
        { path: '/email', message: 'Somebody with this address is here already.' },
      ]);
    }
    await mailInvitation(tx, deps, actor, added.id);
    await audit(tx, actor, {
      action: 'invite',
      subject: 'user',
      subjectId: added.id,
      detail: { email: wanted.email, role: wanted.role },
    });
    return findMember(tx, added.id);
  });
  deps.jobs.wake('mail');
  if (!member) throw new Error('no member row');
  return presentMember(member);
}

export async function inviteAgain(deps: Deps, actor: Actor, id: string): Promise<void> {
  await withShop(deps.database, actor.shopId, async (tx) => {
    const member = await findMember(tx, id);
    if (!member) throw missing('person');
    if (member.hasPassword) throw conflict('This person has chosen a password already.');
    if (member.disabledAt) throw conflict('This person is switched off. Switch them on first.');
    await mailInvitation(tx, deps, actor, id);
    await audit(tx, actor, { action: 'invite_again', subject: 'user', subjectId: id });
  });
  deps.jobs.wake('mail');
}

/** A link to choose a password; or, where there is one, word that there is another shop to go to. */
async function mailInvitation(tx: Transaction, deps: Deps, actor: Actor, id: string): Promise<void> {
  const member = await findMember(tx, id);
  const [shop] = await tx.select({ name: shops.name }).from(shops);
  if (!member || !shop) throw new Error('no member row');
  const { displayName, email } = member;
  const message = member.hasPassword
    ? addedMessage({ displayName, shopName: shop.name, link: deps.config.publicUrl })
    : inviteMessage({
        displayName,
        shopName: shop.name,
        link: await makePasswordLink(tx, deps, member.userId, 'invite'),
      });
  await queueMail(tx, deps, actor.shopId, { to: email, ...message });
}
