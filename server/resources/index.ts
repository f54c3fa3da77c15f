import type { Deps } from '../deps';
import type { Route } from '../http/route';
import { repairRoutes } from './repairs/routes';
import { sessionRoutes } from './session/routes';

/** Every route of the API: a new resource adds its line here. */
export function allRoutes(deps: Deps): Route[] {
  return [...sessionRoutes(deps), ...repairRoutes(deps)];
}
