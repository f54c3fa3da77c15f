import type { Area } from '../../shared/roles';
import { ApiError } from './api';
import { queryClient } from './query-client';
import { can, sessionQuery } from './session';

/** For loaders: what the server would only refuse is not asked for. */
export async function requireArea(area: Area): Promise<void> {
  const { shop } = await queryClient.query({ ...sessionQuery, staleTime: 'static' });
  if (!can(shop.role, area)) throw new ApiError(403, 'Not allowed', 'Your role does not allow this.');
}
