import { queryOptions } from '@tanstack/react-query';
import type { MonthReview } from '../../../shared/reports';
import { apiGet } from '../../lib/api';

const POLL_MS = 4000;

/** "This month": of the month that is asked for, else of the latest that can be judged. */
export const monthReviewQuery = (month: string | undefined) =>
  queryOptions({
    queryKey: ['month', 'detail', month ?? 'latest'],
    queryFn: ({ signal }) => apiGet<MonthReview>('/reports/month', { month }, signal),
    // While fresh records are being read the page looks again by itself.
    refetchInterval: ({ state }) =>
      state.data?.analysis === 'pending' || state.data?.analysis === 'running' ? POLL_MS : false,
  });
