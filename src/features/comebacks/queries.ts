import { queryOptions } from '@tanstack/react-query';
import type { z } from 'zod';
import type { Comeback, decideComeback } from '../../../shared/comebacks';
import type { RateRow } from '../../../shared/reports';
import { apiGet, apiSend, type List } from '../../lib/api';
import { listQuery } from '../../lib/list-query';
import { useChange } from '../../lib/use-change';
import type { ComebackFilters } from './comeback-filters';

export type Decision = z.infer<typeof decideComeback>;

export const comebacksQuery = (filters: ComebackFilters) =>
  listQuery<Comeback>(['comebacks', 'list', filters], '/comebacks', filters);

/** As many as one answer may hold; a longer queue is said to be longer. */
const ALL_IN_ONE = 1000;

/** The comebacks that nobody has looked at yet. */
export const waitingQuery = (filters: ComebackFilters) => {
  const params = { ...filters, status: 'suggested', limit: ALL_IN_ONE };
  return queryOptions({
    queryKey: ['comebacks', 'waiting', filters],
    queryFn: ({ signal }) => apiGet<List<Comeback>>('/comebacks', params, signal),
    select: ({ data, nextCursor }: List<Comeback>) => ({ count: data.length, isMore: nextCursor !== null }),
  });
};

/** How many came back of those whose window is over, and how many of them were the shop's own doing. */
export const technicianRatesQuery = (range: { from?: string | undefined; to?: string | undefined }) =>
  queryOptions({
    queryKey: ['comebacks', 'by-technician', range],
    queryFn: ({ signal }) =>
      apiGet<List<RateRow>>('/reports/comeback-rate', { ...range, by: 'technician' }, signal),
  });

export const modelRatesQuery = (range: { from?: string | undefined; to?: string | undefined }) =>
  queryOptions({
    queryKey: ['comebacks', 'by-model', range],
    queryFn: ({ signal }) =>
      apiGet<List<RateRow>>('/reports/comeback-rate', { ...range, by: 'model' }, signal),
  });

/** Every rate counts what people say of a comeback, so that all is asked for again. */
export const useDecide = (said: string) =>
  useChange(
    ({ id, decision }: { id: string; decision: Decision }) =>
      apiSend<Comeback>('PATCH', `/comebacks/${id}`, decision),
    { said, isForm: true },
  );
