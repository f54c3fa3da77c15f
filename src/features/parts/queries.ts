import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import type { family } from '../../../shared/administration';
import type { ComponentListed, changeComponent, PartLife } from '../../../shared/parts';
import { apiGet, apiSend, type List } from '../../lib/api';
import { notify } from '../../components/ui/toast-store';
import { ApiError } from '../../lib/api';

export type Family = z.infer<typeof family>;
export type ComponentChange = z.infer<typeof changeComponent>;
export type ComponentKind = ComponentListed['kind'];

export type LifeFilters = {
  modelId: string | undefined;
  familyId: string | undefined;
  clock: 'hours' | 'days' | undefined;
  partNumbers: string | undefined;
  reasons: 'known' | 'allFailed' | 'noneFailed' | undefined;
  assumedOriginal: 'true' | undefined;
};

/** A shop has some hundreds of components at most. */
const ALL_IN_ONE = 1000;

export const componentsQuery = (filters: { q?: string | undefined; modelId?: string | undefined } = {}) =>
  queryOptions({
    queryKey: ['parts', 'components', filters],
    queryFn: ({ signal }) =>
      apiGet<List<ComponentListed>>('/components', { ...filters, limit: ALL_IN_ONE }, signal),
  });

export const partLifeQuery = (component: string, filters: LifeFilters) =>
  queryOptions({
    queryKey: ['parts', 'life', component, filters],
    queryFn: ({ signal }) => apiGet<PartLife>('/part-life', { component, ...filters }, signal),
  });

export const familiesQuery = queryOptions({
  queryKey: ['parts', 'families'],
  queryFn: ({ signal }) => apiGet<List<Family>>('/families', { limit: ALL_IN_ONE }, signal),
});

/** Changes what the shop says of a component; every figure that rests on it is asked for again. */
export function useChangeComponent() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ id, change }: { id: string; change: ComponentChange }) =>
      apiSend('PATCH', `/components/${id}`, change),
    onSuccess: async () => {
      await client.invalidateQueries();
      notify('Kept. The figures follow as soon as the records have been read again.');
    },
    onError: (error) => notify(error instanceof ApiError ? error.detail : 'Try again.', 'failed'),
  });
}
