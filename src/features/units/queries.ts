import { queryOptions } from '@tanstack/react-query';
import type { UnitWhole } from '../../../shared/machines';
import { apiGet } from '../../lib/api';

export const unitQuery = (id: string) =>
  queryOptions({
    queryKey: ['units', 'detail', id],
    queryFn: ({ signal }) => apiGet<UnitWhole>(`/units/${id}`, {}, signal),
  });
