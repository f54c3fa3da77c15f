import { and, eq, sql } from 'drizzle-orm';
import type { z } from 'zod';
import type { changeComponent, ComponentListed } from '../../../shared/parts';
import type { Transaction } from '../../db/client';
import { foldText } from '../../db/fold';
import { components, repairLines } from '../../db/schema/index';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import type { Actor } from '../../http/actor';
import { audit } from '../../http/audit';
import { invalid, missing } from '../../http/errors';
import { requestAnalysis } from '../../jobs/request-analysis';
import { presentOne } from './service';

type Change = z.output<typeof changeComponent>;

/** What a replacement of such a component means where the record gives no reason. */
const REASON_OF_KIND: Record<NonNullable<Change['kind']>, string> = {
  service_item: 'maintenance',
  only_when_bad: 'failed',
  depends: 'unknown',
  unset: 'unknown',
};

/**
 * Names a component anew, puts it into a system, or decides when it is changed; the last also gives the lines that
 * state no reason theirs, or takes it back.
 * @throws missing, invalid
 */
export async function changeOneComponent(
  deps: Deps,
  actor: Actor,
  id: string,
  change: Change,
): Promise<ComponentListed> {
  if (Object.keys(change).length === 0) throw invalid('Say what is to be changed.');
  const { component, isChanged } = await withShop(deps.database, actor.shopId, async (tx) => {
    const [before] = await tx
      .select({ name: components.name, system: components.system, kind: components.kind })
      .from(components)
      .where(eq(components.id, id))
      .for('update');
    if (!before) throw missing('component');
    const after = { ...before, ...change };
    const hasChanged =
      after.name !== before.name || after.system !== before.system || after.kind !== before.kind;
    if (hasChanged) {
      await tx
        .update(components)
        .set({ ...after, nameKey: foldText(after.name) })
        .where(eq(components.id, id));
      const lines =
        change.kind !== undefined && change.kind !== before.kind
          ? await rederiveReasons(tx, id, REASON_OF_KIND[change.kind])
          : 0;
      await audit(tx, actor, {
        action: 'component.change',
        subject: 'component',
        subjectId: id,
        detail: { before, after, lines },
      });
      await requestAnalysis(tx, deps, actor.shopId);
    }
    return { component: await presentOne(tx, actor, id), isChanged: hasChanged };
  });
  if (isChanged) deps.jobs.wake('analysis');
  return component;
}

/** Fitted parts of the component whose reason nobody stated, set-wise; what the file, dictionary or a person said stays. */
async function rederiveReasons(tx: Transaction, componentId: string, reason: string): Promise<number> {
  const { rowCount } = await tx
    .update(repairLines)
    .set({ reason, reasonOrigin: reason === 'unknown' ? 'unknown' : 'rule' })
    .where(
      and(
        eq(repairLines.componentId, componentId),
        eq(repairLines.kind, 'part'),
        sql`coalesce(${repairLines.quantity}, 1) > 0 AND coalesce(${repairLines.amountCents}, 0) >= 0`,
        sql`${repairLines.reasonOrigin} IN ('rule', 'unknown')`,
        sql`${repairLines.reason} <> ${reason}`,
      ),
    );
  return rowCount ?? 0;
}
