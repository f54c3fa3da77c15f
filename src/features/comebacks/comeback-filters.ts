/** What a list of comebacks is narrowed by; the days are of the first repair's work. */
export type ComebackFilters = {
  status?: string | undefined;
  from?: string | undefined;
  to?: string | undefined;
  technicianId?: string | undefined;
  modelId?: string | undefined;
  componentId?: string | undefined;
};

export const STATUS_OPTIONS = [
  { value: 'suggested', label: 'to look at' },
  { value: 'confirmed', label: 'confirmed' },
  { value: 'dismissed', label: 'put aside' },
  { value: 'all', label: 'all' },
];

/** Which status the address asks for; where it says nothing, what needs doing for who can do it. */
export function statusOf(search: URLSearchParams, isDecider: boolean): string {
  const said = search.get('status');
  if (STATUS_OPTIONS.some(({ value }) => value === said)) return said ?? 'all';
  return isDecider ? 'suggested' : 'all';
}

export function comebackFiltersOf(search: URLSearchParams, isDecider: boolean): ComebackFilters {
  const status = statusOf(search, isDecider);
  const said = (name: string) => search.get(name) || undefined;
  return {
    status: status === 'all' ? undefined : status,
    from: said('from'),
    to: said('to'),
    technicianId: said('technicianId'),
    modelId: said('modelId'),
    componentId: said('componentId'),
  };
}
