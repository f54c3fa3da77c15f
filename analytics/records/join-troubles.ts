import type { CascadeLink } from './comeback-types';
import type { RepairFacts } from './repair-facts';
import type { Join } from './suggest-reason';

type Cascade = NonNullable<Join['cascade']>;

/**
 * Makes the function that says whether a later repair is of the same trouble as an earlier one: the same component
 * again, a cascade of the model between them (or both resultant of one cause in it), or the same system.
 */
export function joinTroubles(
  cascades: readonly CascadeLink[],
): (first: RepairFacts, back: RepairFacts) => Join | null {
  const causes = new Map<string, Map<string, Set<string>>>();
  for (const { modelId, causalId, resultantId } of cascades) {
    const ofModel = causes.get(modelId) ?? new Map<string, Set<string>>();
    causes.set(modelId, ofModel);
    const ofResultant = ofModel.get(resultantId) ?? new Set<string>();
    ofModel.set(resultantId, ofResultant);
    ofResultant.add(causalId);
  }
  return (first, back) => {
    const same = sameComponent(first, back);
    const cascade = cascadeBetween(first, back, causes.get(back.modelId ?? first.modelId ?? ''));
    if (same !== null) return { link: 'same_component', componentId: same, cascade };
    if (cascade) return { link: 'cascade', componentId: cascade.firstId, cascade };
    if (!first.systemIds.some((id) => back.systemIds.includes(id))) return null;
    const componentId = first.troubleComponentIds[0] ?? back.troubleComponentIds[0] ?? null;
    return { link: 'same_system', componentId, cascade: null };
  };
}

/** Trouble at the return with something that was replaced or worked on before, trouble first. */
function sameComponent(first: RepairFacts, back: RepairFacts): string | null {
  const isBack = (id: string) => back.troubleComponentIds.includes(id);
  return first.troubleComponentIds.find(isBack) ?? first.componentIds.find(isBack) ?? null;
}

/** The missed cause before two resultants of one cause, and these before damage that shows after the cause was cured. */
function cascadeBetween(
  first: RepairFacts,
  back: RepairFacts,
  causes: ReadonlyMap<string, ReadonlySet<string>> | undefined,
): Cascade | null {
  if (!causes) return null;
  let oneCause: Cascade | null = null;
  let after: Cascade | null = null;
  for (const firstId of first.troubleComponentIds) {
    const causesOfFirst = causes.get(firstId);
    for (const backId of back.troubleComponentIds) {
      if (backId === firstId) continue;
      if (causesOfFirst?.has(backId)) return { causalId: backId, firstId, backId };
      const causesOfBack = causes.get(backId);
      const shared = [...(causesOfFirst ?? [])].find((id) => causesOfBack?.has(id));
      if (shared !== undefined) oneCause ??= { causalId: shared, firstId, backId };
      if (causesOfBack?.has(firstId)) after ??= { causalId: firstId, firstId, backId };
    }
  }
  return oneCause ?? after;
}
