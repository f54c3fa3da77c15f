import { queryOptions } from '@tanstack/react-query';
import type { z } from 'zod';
import type { linkedRepair, RepairListed, RepairWhole } from '../../../shared/repairs';
import { apiGet } from '../../lib/api';
import { listQuery } from '../../lib/list-query';
import type { RepairFilters } from './repair-filters';

export type LinkedRepair = z.infer<typeof linkedRepair>;

export const repairsQuery = (filters: RepairFilters) =>
  listQuery<RepairListed>(['repairs', 'list', filters], '/repairs', filters);

export const repairQuery = (id: string) =>
  queryOptions({
    queryKey: ['repairs', 'detail', id],
    queryFn: ({ signal }) => apiGet<RepairWhole>(`/repairs/${id}`, {}, signal),
  });
