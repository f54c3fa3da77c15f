import { queryOptions } from '@tanstack/react-query';
import type { Finding, FindingSummary, FindingWhole } from '../../../shared/findings';
import { apiGet, type List } from '../../lib/api';

export const findingsQuery = (modelId: string | undefined) =>
  queryOptions({
    queryKey: ['cascades', 'list', modelId ?? 'all'],
    queryFn: ({ signal }) => apiGet<List<Finding>>('/cascades', { modelId }, signal),
  });

export const findingSummaryQuery = queryOptions({
  queryKey: ['cascades', 'summary'],
  queryFn: ({ signal }) => apiGet<FindingSummary>('/cascades/summary', {}, signal),
});

export const findingQuery = (id: string) =>
  queryOptions({
    queryKey: ['cascades', 'detail', id],
    queryFn: ({ signal }) => apiGet<FindingWhole>(`/cascades/${id}`, {}, signal),
  });
