import { eq } from 'drizzle-orm';
import { z } from 'zod';
import type { saveFamily } from '../../../shared/administration';
import type { Transaction } from '../../db/client';
import { foldText } from '../../db/fold';
import { families } from '../../db/schema/index';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import type { Actor } from '../../http/actor';
import { audit } from '../../http/audit';
import { decodeCursor, pageOf } from '../../http/cursor';
import { invalid, missing } from '../../http/errors';
import { requestAnalysis } from '../../jobs/request-analysis';
import { findFamily, listFamilyRows, setModels, unknownModels } from './queries';

type Wanted = z.infer<typeof saveFamily>;
type FamilyRow = NonNullable<Awaited<ReturnType<typeof findFamily>>>;

const present = ({ id, name, models }: FamilyRow) => ({ id, name, models });

export async function listFamilies(deps: Deps, actor: Actor, page: { limit: number; cursor?: string }) {
  const after = decodeCursor(page.cursor, z.tuple([z.string()]))?.[0];
  const rows = await withShop(deps.database, actor.shopId, (tx) =>
    listFamilyRows(tx, { limit: page.limit + 1, ...(after === undefined ? {} : { after }) }),
  );
  const { data, nextCursor } = pageOf(rows, page.limit, (row) => [row.nameKey]);
  return { data: data.map(present), nextCursor };
}

export const createFamily = (deps: Deps, actor: Actor, wanted: Wanted) =>
  change(deps, actor, 'create', async (tx) => {
    await requireModels(tx, wanted);
    const [created] = await tx
      .insert(families)
      .values({ shopId: actor.shopId, name: wanted.name, nameKey: foldText(wanted.name) })
      .returning({ id: families.id });
    if (!created) throw new Error('no family row');
    await setModels(tx, actor.shopId, created.id, wanted.modelIds);
    return created.id;
  });

export const replaceFamily = (deps: Deps, actor: Actor, id: string, wanted: Wanted) =>
  change(deps, actor, 'change', async (tx) => {
    const changed = await tx
      .update(families)
      .set({ name: wanted.name, nameKey: foldText(wanted.name) })
      .where(eq(families.id, id))
      .returning({ id: families.id });
    if (changed.length === 0) throw missing('family');
    await requireModels(tx, wanted);
    await setModels(tx, actor.shopId, id, wanted.modelIds);
    return id;
  });

export async function removeFamily(deps: Deps, actor: Actor, id: string): Promise<void> {
  await withShop(deps.database, actor.shopId, async (tx) => {
    const removed = await tx.delete(families).where(eq(families.id, id)).returning({ name: families.name });
    if (!removed[0]) throw missing('family');
    await audit(tx, actor, { action: 'remove', subject: 'family', subjectId: id, detail: removed[0] });
    await requestAnalysis(tx, deps, actor.shopId);
  });
  deps.jobs.wake('analysis');
}

/** What is common to every change: it is noted, and the findings are computed anew. */
async function change(deps: Deps, actor: Actor, action: string, work: (tx: Transaction) => Promise<string>) {
  const family = await withShop(deps.database, actor.shopId, async (tx) => {
    const id = await work(tx);
    const changed = await findFamily(tx, id);
    if (!changed) throw missing('family');
    await audit(tx, actor, { action, subject: 'family', subjectId: id, detail: present(changed) });
    await requestAnalysis(tx, deps, actor.shopId);
    return changed;
  });
  deps.jobs.wake('analysis');
  return present(family);
}

async function requireModels(tx: Transaction, { modelIds }: Wanted): Promise<void> {
  const unknown = new Set(await unknownModels(tx, modelIds));
  if (unknown.size === 0) return;
  throw invalid(
    'The body cannot be used as sent.',
    modelIds.flatMap((id, at) =>
      unknown.has(id) ? [{ path: `/modelIds/${at}`, message: 'There is no such model.' }] : [],
    ),
  );
}
