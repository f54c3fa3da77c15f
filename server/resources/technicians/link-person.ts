import { and, eq, ne } from 'drizzle-orm';
import type { Transaction } from '../../db/client';
import { memberships, technicians } from '../../db/schema/index';
import { invalid } from '../../http/errors';

/** Says which technician of the records a person of the shop is, or that they are none; each is at most one. */
export async function linkPerson(
  tx: Transaction,
  { userId, technicianId }: { userId: string; technicianId: string | null },
): Promise<void> {
  const isOther = technicianId === null ? undefined : ne(technicians.id, technicianId);
  await tx
    .update(technicians)
    .set({ userId: null })
    .where(and(eq(technicians.userId, userId), isOther));
  if (technicianId === null) return;
  const linked = await tx
    .update(technicians)
    .set({ userId })
    .where(eq(technicians.id, technicianId))
    .returning({ id: technicians.id });
  if (linked.length === 0) {
    throw invalid('The body cannot be used as sent.', [
      { path: '/technicianId', message: 'There is no such technician.' },
    ]);
  }
}

/** @throws invalid where the person does not belong to this shop. */
export async function requirePersonOfShop(tx: Transaction, userId: string): Promise<void> {
  const [found] = await tx
    .select({ id: memberships.id })
    .from(memberships)
    .where(eq(memberships.userId, userId));
  if (!found) {
    throw invalid('The body cannot be used as sent.', [
      { path: '/userId', message: 'Nobody in this shop has this id.' },
    ]);
  }
}
