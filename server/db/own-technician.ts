import { eq } from 'drizzle-orm';
import type { Actor } from '../http/actor';
import type { Transaction } from './client';
import { technicians } from './schema/index';

/** The technician that a signed-in person is in this shop's records, if anybody said so. */
export async function ownTechnicianId(tx: Transaction, actor: Actor): Promise<string | undefined> {
  if (actor.kind !== 'user') return undefined;
  const [own] = await tx
    .select({ id: technicians.id })
    .from(technicians)
    .where(eq(technicians.userId, actor.userId));
  return own?.id;
}
