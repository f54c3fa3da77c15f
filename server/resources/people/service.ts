import { eq } from 'drizzle-orm';
import { z } from 'zod';
import type { changeMember, Member } from '../../../shared/administration';
import type { Transaction } from '../../db/client';
import { memberships, sessions, users } from '../../db/schema/index';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import type { Actor } from '../../http/actor';
import { audit } from '../../http/audit';
import { membershipsOf } from '../../http/authenticate';
import { decodeCursor, pageOf } from '../../http/cursor';
import { conflict, missing } from '../../http/errors';
import { endSessionsOf } from '../session/sessions';
import { linkPerson } from '../technicians/link-person';
import { presentMember } from './present';
import { findMember, listMembers, lockOwners } from './queries';

type Change = z.infer<typeof changeMember>;

export async function listPeople(deps: Deps, actor: Actor, page: { limit: number; cursor?: string }) {
  const after = decodeCursor(page.cursor, z.tuple([z.string()]))?.[0];
  const rows = await withShop(deps.database, actor.shopId, (tx) =>
    listMembers(tx, { limit: page.limit + 1, ...(after === undefined ? {} : { after }) }),
  );
  const { data, nextCursor } = pageOf(rows, page.limit, (row) => [row.email]);
  return { data: data.map(presentMember), nextCursor };
}

/**
 * Changes a person's name, role, technician, or whether they may sign in.
 * @throws conflict where nobody would be left who can run the shop.
 */
export function changePerson(deps: Deps, actor: Actor, id: string, change: Change): Promise<Member> {
  return withShop(deps.database, actor.shopId, async (tx) => {
    const owners = await lockOwners(tx);
    const before = await findMember(tx, id);
    if (!before) throw missing('person');
    const stepsDown = change.isDisabled === true || (change.role !== undefined && change.role !== 'owner');
    if (stepsDown && owners.every((owner) => owner === id) && owners.length > 0) {
      throw conflict('This is the last owner who can sign in. Make somebody else an owner first.');
    }
    if (change.displayName !== undefined) await rename(tx, actor.shopId, before.userId, change.displayName);
    if (change.role !== undefined || change.isDisabled !== undefined) {
      await tx
        .update(memberships)
        .set({
          role: change.role ?? before.role,
          disabledAt:
            change.isDisabled === undefined ? before.disabledAt : change.isDisabled ? deps.now() : null,
        })
        .where(eq(memberships.id, id));
    }
    if (change.isDisabled) {
      await endSessionsOf(tx, deps.now(), before.userId, eq(sessions.shopId, actor.shopId));
    }
    if (change.technicianId !== undefined) {
      await linkPerson(tx, { userId: before.userId, technicianId: change.technicianId });
    }
    await audit(tx, actor, { action: 'change', subject: 'user', subjectId: id, detail: change });
    const after = await findMember(tx, id);
    if (!after) throw missing('person');
    return presentMember(after);
  });
}

/** A name belongs to the person: one shop does not rename whom another shop knows too. */
async function rename(tx: Transaction, shopId: string, userId: string, displayName: string): Promise<void> {
  const elsewhere = (await membershipsOf(tx, userId)).some((shop) => shop.id !== shopId);
  if (elsewhere) {
    throw conflict('This person works in another shop too, so their name stays as it is.', [
      { path: '/displayName', message: 'Another shop knows this person by this name.' },
    ]);
  }
  await tx.update(users).set({ displayName }).where(eq(users.id, userId));
}
