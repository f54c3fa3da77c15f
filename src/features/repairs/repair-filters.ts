const NAMES = ['q', 'from', 'to', 'modelId', 'componentId', 'unitId', 'technicianId', 'cameBack'] as const;

/** What a list of repairs is narrowed by; each stands in the address under its own name. */
export type RepairFilters = Partial<Record<(typeof NAMES)[number], string>>;

export function repairFiltersOf(search: URLSearchParams): RepairFilters {
  return Object.fromEntries(
    NAMES.flatMap((name) => {
      const value = search.get(name);
      return value ? [[name, value]] : [];
    }),
  );
}

export const hasFilters = (filters: RepairFilters): boolean => Object.keys(filters).length > 0;
