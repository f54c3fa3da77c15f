import { eq } from 'drizzle-orm';
import { z } from 'zod';
import type { changeTechnician, Technician } from '../../../shared/administration';
import type { Transaction } from '../../db/client';
import { technicianNames, technicians } from '../../db/schema/index';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import { requireUser, type Actor } from '../../http/actor';
import { audit } from '../../http/audit';
import { decodeCursor, pageOf } from '../../http/cursor';
import { invalid, missing } from '../../http/errors';
import { linkPerson, requirePersonOfShop } from './link-person';
import {
  findTechnicianRow,
  listTechnicianRows,
  removeIfUnnamed,
  repairsBySpelling,
  rewriteRepairTechnicians,
  spellingsOf,
} from './queries';

type TechnicianRow = Awaited<ReturnType<typeof listTechnicianRows>>[number];

/** The technicians of the records by name, each with the spellings that mean them and how many repairs bear each. */
export function listTechnicians(deps: Deps, actor: Actor, page: { limit: number; cursor?: string }) {
  const after = decodeCursor(page.cursor, z.tuple([z.string(), z.uuid()]));
  return withShop(deps.database, actor.shopId, async (tx) => {
    const rows = await listTechnicianRows(tx, { limit: page.limit + 1, ...(after ? { after } : {}) });
    const { data, nextCursor } = pageOf(rows, page.limit, (row) => [row.displayName, row.id]);
    return { data: await present(tx, data), nextCursor };
  });
}

export function changeTechnicianRow(
  deps: Deps,
  actor: Actor,
  id: string,
  { userId, ...columns }: z.infer<typeof changeTechnician>,
): Promise<Technician> {
  return withShop(deps.database, actor.shopId, async (tx) => {
    const [before] = await findTechnicianRow(tx, id);
    if (!before) throw missing('technician');
    if (Object.keys(columns).length > 0)
      await tx.update(technicians).set(columns).where(eq(technicians.id, id));
    if (userId === null) await tx.update(technicians).set({ userId }).where(eq(technicians.id, id));
    if (userId) {
      await requirePersonOfShop(tx, userId);
      await linkPerson(tx, { userId, technicianId: id });
    }
    await audit(tx, actor, {
      action: 'change',
      subject: 'technician',
      subjectId: id,
      detail: { ...columns, userId },
    });
    return presentOne(tx, id);
  });
}

/** "This spelling means that person": every repair that bears it is theirs from now on. */
export function assignSpelling(
  deps: Deps,
  actor: Actor,
  spellingId: string,
  technicianId: string,
): Promise<Technician> {
  const { userId } = requireUser(actor);
  return withShop(deps.database, actor.shopId, async (tx) => {
    const [before] = await tx
      .select({ technicianId: technicianNames.technicianId, spellingKey: technicianNames.spellingKey })
      .from(technicianNames)
      .where(eq(technicianNames.id, spellingId))
      .for('update');
    if (!before) throw missing('spelling');
    const [target] = await findTechnicianRow(tx, technicianId);
    if (!target) {
      throw invalid('The body cannot be used as sent.', [
        { path: '/technicianId', message: 'There is no such technician.' },
      ]);
    }
    await tx
      .update(technicianNames)
      .set({ technicianId, confirmedByUserId: userId })
      .where(eq(technicianNames.id, spellingId));
    if (before.technicianId !== technicianId) {
      await rewriteRepairTechnicians(tx, actor.shopId, before.spellingKey);
      const removed = await removeIfUnnamed(tx, before.technicianId);
      // Who signs in as the technician that is gone is now the one whom the spelling means.
      if (removed?.user_id && !target.userId) {
        await linkPerson(tx, { userId: removed.user_id, technicianId });
      }
    }
    await audit(tx, actor, {
      action: 'assign_spelling',
      subject: 'technician',
      subjectId: technicianId,
      detail: { spelling: before.spellingKey, from: before.technicianId },
    });
    return presentOne(tx, technicianId);
  });
}

async function presentOne(tx: Transaction, id: string): Promise<Technician> {
  const [presented] = await present(tx, await findTechnicianRow(tx, id));
  if (!presented) throw missing('technician');
  return presented;
}

async function present(tx: Transaction, rows: readonly TechnicianRow[]): Promise<Technician[]> {
  const spellings = await spellingsOf(
    tx,
    rows.map(({ id }) => id),
  );
  const repairs = await repairsBySpelling(tx);
  return rows.map((row) => ({
    ...row,
    spellings: spellings
      .filter(({ technicianId }) => technicianId === row.id)
      .map(({ id, spelling, spellingKey, isConfirmed }) => ({
        id,
        spelling,
        isConfirmed,
        repairs: repairs.get(spellingKey) ?? 0,
      })),
  }));
}
