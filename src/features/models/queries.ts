import { queryOptions } from '@tanstack/react-query';
import type { ModelListed, ModelWhole } from '../../../shared/machines';
import type { RateRow } from '../../../shared/reports';
import { apiGet, type List } from '../../lib/api';

/** As many as one answer may hold; a shop with more finds the rest by searching. */
const ALL_IN_ONE = 1000;

export const modelsQuery = (filters: { q?: string | undefined } = {}) =>
  queryOptions({
    queryKey: ['models', 'list', filters],
    queryFn: ({ signal }) => apiGet<List<ModelListed>>('/models', { ...filters, limit: ALL_IN_ONE }, signal),
  });

export const modelQuery = (id: string) =>
  queryOptions({
    queryKey: ['models', 'detail', id],
    queryFn: ({ signal }) => apiGet<ModelWhole>(`/models/${id}`, {}, signal),
  });

/** What came back by model, raw and after allowing for few jobs. */
export const rateByModelQuery = queryOptions({
  queryKey: ['models', 'rates'],
  queryFn: ({ signal }) => apiGet<List<RateRow>>('/reports/comeback-rate', { by: 'model' }, signal),
});

export const nameOf = ({ maker, model }: Pick<ModelListed, 'maker' | 'model'>): string => `${maker} ${model}`;
