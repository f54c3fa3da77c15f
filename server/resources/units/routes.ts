import { idParams } from '../../../shared/basics';
import { unitList, unitQuery, unitWhole } from '../../../shared/machines';
import type { Deps } from '../../deps';
import { route, type Route } from '../../http/route';
import { listUnits, readUnit } from './service';

/** Machines, and each one's timeline. */
export function unitRoutes(deps: Deps): Route[] {
  return [
    route({
      method: 'get',
      path: '/units',
      tag: 'records',
      summary: 'Machines by serial or tag',
      access: { area: 'records', verb: 'read' },
      query: unitQuery,
      answer: unitList,
      handle: ({ actor, query }) => listUnits(deps, actor, query),
    }),
    route({
      method: 'get',
      path: '/units/:id',
      tag: 'records',
      summary: 'One machine: its repairs, readings and what is fitted in it',
      access: { area: 'records', verb: 'read' },
      params: idParams,
      answer: unitWhole,
      handle: ({ actor, params }) => readUnit(deps, actor, params.id),
    }),
  ];
}
