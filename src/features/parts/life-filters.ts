import type { LifeFilters } from './queries';

/** What the page's address says; anything else is taken for not said. */
export type LifeAddress = LifeFilters & { isApart: boolean };

export function readAddress(search: URLSearchParams): LifeAddress {
  const clock = search.get('clock');
  const reasons = search.get('reasons');
  return {
    modelId: search.get('model') ?? undefined,
    familyId: search.get('family') ?? undefined,
    clock: clock === 'hours' || clock === 'days' ? clock : undefined,
    partNumbers: search.get('only') ?? undefined,
    reasons: reasons === 'allFailed' || reasons === 'noneFailed' ? reasons : undefined,
    assumedOriginal: search.get('original') === 'true' ? 'true' : undefined,
    isApart: search.get('numbers') === 'apart',
  };
}

export function filtersOf({ isApart: _, ...filters }: LifeAddress): LifeFilters {
  return filters;
}

/** Changes one choice and keeps the others. */
export function withChoice(
  search: URLSearchParams,
  changes: Record<string, string | undefined>,
): URLSearchParams {
  const next = new URLSearchParams(search);
  for (const [name, value] of Object.entries(changes)) {
    if (value === undefined) next.delete(name);
    else next.set(name, value);
  }
  return next;
}
