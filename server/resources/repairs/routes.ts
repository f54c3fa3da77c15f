import { idParams } from '../../../shared/basics';
import { repairList, repairQuery, repairWhole } from '../../../shared/repairs';
import type { Deps } from '../../deps';
import { route, type Route } from '../../http/route';
import { listRepairs, readRepair } from './service';

/** Closed repair records, as they came and as they were understood. */
export function repairRoutes(deps: Deps): Route[] {
  return [
    route({
      method: 'get',
      path: '/repairs',
      tag: 'records',
      summary: 'Repairs, newest work first',
      access: { area: 'records', verb: 'read' },
      query: repairQuery,
      answer: repairList,
      handle: ({ actor, query }) => listRepairs(deps, actor, query),
    }),
    route({
      method: 'get',
      path: '/repairs/:id',
      tag: 'records',
      summary: 'One repair with its lines',
      access: { area: 'records', verb: 'read' },
      params: idParams,
      answer: repairWhole,
      handle: ({ actor, params }) => readRepair(deps, actor, params.id),
    }),
  ];
}
