import { eq } from 'drizzle-orm';
import type { z } from 'zod';
import type { Comeback, decideComeback } from '../../../shared/comebacks';
import type { Transaction } from '../../db/client';
import { comebackDecisions, comebacks } from '../../db/schema/index';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import type { Actor } from '../../http/actor';
import { audit } from '../../http/audit';
import { forbidden, invalid, missing } from '../../http/errors';
import { requestAnalysis } from '../../jobs/request-analysis';
import { findVisit, leadsBack } from './queries';
import { readComeback } from './service';

type Change = z.output<typeof decideComeback>;

/**
 * Writes a person's word on a return: it holds at once, and outlives imports and computations. What is not named
 * stays as it was. A repair that no computation suggested becomes a return by being attached to an earlier one.
 * @throws missing, invalid
 */
export async function decide(deps: Deps, actor: Actor, id: string, change: Change): Promise<Comeback> {
  if (actor.kind !== 'user') throw forbidden('A decision is a person’s word.');
  if (Object.keys(change).length === 0) throw invalid('Say what is to be changed.');
  const { comeback, isMoved } = await withShop(deps.database, actor.shopId, async (tx) => {
    const before = await standingOf(tx, id);
    const after = { ...before.decision, ...change };
    if (!before.isComputed && after.attachedToRepairId === null) throw missing('comeback');
    if (change.attachedToRepairId) await requireEarlierVisit(tx, id, change.attachedToRepairId);
    const written = { ...after, decidedByUserId: actor.userId, decidedAt: deps.now() };
    await tx
      .insert(comebackDecisions)
      .values({ shopId: actor.shopId, returnRepairId: id, ...written })
      .onConflictDoUpdate({
        target: [comebackDecisions.shopId, comebackDecisions.returnRepairId],
        set: written,
      });
    await audit(tx, actor, {
      action: 'comeback.decide',
      subject: 'comeback',
      subjectId: id,
      detail: { before: before.decision, after },
    });
    const hasMoved = after.attachedToRepairId !== before.decision.attachedToRepairId;
    if (hasMoved) await requestAnalysis(tx, deps, actor.shopId);
    return { comeback: await readComeback(tx, actor, id), isMoved: hasMoved };
  });
  if (isMoved) deps.jobs.wake('analysis');
  return comeback;
}

/** What people said so far, and whether the computation suggests the return by itself. */
async function standingOf(tx: Transaction, id: string) {
  const [computed] = await tx
    .select({ id: comebacks.returnRepairId })
    .from(comebacks)
    .where(eq(comebacks.returnRepairId, id));
  const [decision] = await tx
    .select({
      status: comebackDecisions.status,
      reason: comebackDecisions.reason,
      isOurs: comebackDecisions.isOurs,
      attachedToRepairId: comebackDecisions.attachedToRepairId,
      note: comebackDecisions.note,
    })
    .from(comebackDecisions)
    .where(eq(comebackDecisions.returnRepairId, id))
    .for('update');
  const nothingSaid = { status: 'suggested', reason: null, isOurs: null, attachedToRepairId: null, note: '' };
  return { isComputed: computed !== undefined, decision: decision ?? nothingSaid };
}

/** A return attaches to another, earlier visit of the same machine. */
async function requireEarlierVisit(tx: Transaction, id: string, attachedToRepairId: string): Promise<void> {
  const later = await findVisit(tx, id);
  if (!later) throw missing('comeback');
  const earlier = await findVisit(tx, attachedToRepairId);
  const refuse = (message: string) =>
    invalid('The return cannot be attached there.', [{ path: '/attachedToRepairId', message }]);
  if (!earlier) throw refuse('There is no such repair.');
  if (earlier.id === later.id) throw refuse('A repair is no return of itself.');
  if (earlier.unitId === null || earlier.unitId !== later.unitId) throw refuse('That was another machine.');
  if (earlier.openedOn > later.openedOn) throw refuse('That repair came later.');
  if (await leadsBack(tx, attachedToRepairId, id))
    throw refuse('That repair is itself a return of this one.');
}
