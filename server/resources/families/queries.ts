import { and, asc, eq, gt, inArray, sql } from 'drizzle-orm';
import type { Transaction } from '../../db/client';
import { families, familyModels, models } from '../../db/schema/index';

type Family = { id: string; name: string; nameKey: string };

const columns = { id: families.id, name: families.name, nameKey: families.nameKey };

/** Families by name, each with its models: two queries whatever their number. */
export async function listFamilyRows(tx: Transaction, { after, limit }: { after?: string; limit: number }) {
  const found = await tx
    .select(columns)
    .from(families)
    .where(after === undefined ? undefined : gt(families.nameKey, after))
    .orderBy(asc(families.nameKey))
    .limit(limit);
  return withModels(tx, found);
}

export async function findFamily(tx: Transaction, id: string) {
  const found = await tx.select(columns).from(families).where(eq(families.id, id));
  return (await withModels(tx, found))[0];
}

export async function setModels(
  tx: Transaction,
  shopId: string,
  familyId: string,
  modelIds: readonly string[],
) {
  await tx.delete(familyModels).where(eq(familyModels.familyId, familyId));
  const distinct = [...new Set(modelIds)];
  if (distinct.length === 0) return;
  await tx.insert(familyModels).values(distinct.map((modelId) => ({ shopId, familyId, modelId })));
}

/** Those of the ids that are no models of this shop. */
export async function unknownModels(tx: Transaction, modelIds: readonly string[]): Promise<string[]> {
  const known = await tx
    .select({ id: models.id })
    .from(models)
    .where(inArray(models.id, [...modelIds]));
  const ids = new Set(known.map(({ id }) => id));
  return modelIds.filter((id) => !ids.has(id));
}

async function withModels(tx: Transaction, rows: readonly Family[]) {
  const members = await tx
    .select({
      familyId: familyModels.familyId,
      id: models.id,
      name: sql<string>`${models.maker} || ' ' || ${models.model}`,
    })
    .from(familyModels)
    .innerJoin(models, and(eq(models.id, familyModels.modelId), eq(models.shopId, familyModels.shopId)))
    .where(
      inArray(
        familyModels.familyId,
        rows.map(({ id }) => id),
      ),
    )
    .orderBy(asc(models.makerKey), asc(models.modelKey));
  return rows.map((row) => ({
    ...row,
    models: members.filter(({ familyId }) => familyId === row.id).map(({ id, name }) => ({ id, name })),
  }));
}
