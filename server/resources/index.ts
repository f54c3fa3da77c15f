import type { Deps } from '../deps';
import type { Route } from '../http/route';
import { partRoutes } from './parts/routes';
import { repairRoutes } from './repairs/routes';
import { sessionRoutes } from './session/routes';
import { unitRoutes } from './units/routes';

/** Every route of the API: a new resource adds its line here. */
export function allRoutes(deps: Deps): Route[] {
  return [...sessionRoutes(deps), ...repairRoutes(deps), ...unitRoutes(deps), ...partRoutes(deps)];
}
