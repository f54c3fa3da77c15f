import type { z } from 'zod';
import type { Named } from '../../../shared/basics';
import type { partLifeQuery } from '../../../shared/parts';
import type { Transaction } from '../../db/client';
import { missing } from '../../http/errors';
import { findFamily, findModels } from './queries';

export type LifeScope = {
  /** null: every model. */
  modelIds: readonly string[] | null;
  model: Named | null;
  family: Named | null;
};

/**
 * The models that a question is about.
 * @throws missing where the model or family is not there
 */
export async function scopeOf(tx: Transaction, query: z.output<typeof partLifeQuery>): Promise<LifeScope> {
  const { maker, model, modelId, familyId } = query;
  const family = familyId === undefined ? undefined : await findFamily(tx, familyId);
  if (familyId !== undefined && !family) throw missing('family');
  const models = maker || model || modelId ? await findModels(tx, { maker, model, modelId }) : null;
  if (models?.length === 0) throw missing('model');
  const ofFamily = family && new Set(family.modelIds);
  const modelIds = models
    ? models.map(({ id }) => id).filter((id) => !ofFamily || ofFamily.has(id))
    : (family?.modelIds ?? null);
  return {
    modelIds,
    model: models?.length === 1 ? (models[0] ?? null) : null,
    family: family ? { id: family.id, name: family.name } : null,
  };
}
