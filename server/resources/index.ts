import type { Deps } from '../deps';
import type { Route } from '../http/route';
import { auditRoutes } from './audit-log/routes';
import { cascadeRoutes } from './cascades/routes';
import { comebackRoutes } from './comebacks/routes';
import { componentRoutes } from './components/routes';
import { familyRoutes } from './families/routes';
import { importRoutes } from './imports/routes';
import { keyRoutes } from './keys/routes';
import { modelRoutes } from './models/routes';
import { openApiRoutes } from './openapi/routes';
import { outboxRoutes } from './outbox/routes';
import { partLifeRoutes } from './part-life/routes';
import { partRoutes } from './parts/routes';
import { passwordRoutes } from './password/routes';
import { peopleRoutes } from './people/routes';
import { repairRoutes } from './repairs/routes';
import { repairsBatchRoutes } from './repairs-batch/routes';
import { reportRoutes } from './reports/routes';
import { sessionRoutes } from './session/routes';
import { shopRoutes } from './shop/routes';
import { technicianRoutes } from './technicians/routes';
import { unitRoutes } from './units/routes';

/** Every route of the API: a new resource adds its line here. */
export function allRoutes(deps: Deps): Route[] {
  const routes = [
    ...sessionRoutes(deps),
    ...importRoutes(deps),
    ...repairsBatchRoutes(deps),
    ...repairRoutes(deps),
    ...unitRoutes(deps),
    ...modelRoutes(deps),
    ...componentRoutes(deps),
    ...partRoutes(deps),
    ...partLifeRoutes(deps),
    ...cascadeRoutes(deps),
    ...comebackRoutes(deps),
    ...reportRoutes(deps),
    ...peopleRoutes(deps),
    ...keyRoutes(deps),
    ...shopRoutes(deps),
    ...technicianRoutes(deps),
    ...familyRoutes(deps),
    ...outboxRoutes(deps),
    ...auditRoutes(deps),
    ...passwordRoutes(deps),
  ];
  return [...routes, ...openApiRoutes(routes)];
}
