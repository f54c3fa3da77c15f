import { idParams } from '../../../shared/basics';
import { modelList, modelQuery, modelWhole } from '../../../shared/machines';
import type { Deps } from '../../deps';
import { route, type Route } from '../../http/route';
import { listModels, readModel } from './service';

/** Models, and what fails on each. */
export function modelRoutes(deps: Deps): Route[] {
  return [
    route({
      method: 'get',
      path: '/models',
      tag: 'records',
      summary: 'Models by maker and name',
      access: { area: 'records', verb: 'read' },
      query: modelQuery,
      answer: modelList,
      handle: ({ actor, query }) => listModels(deps, actor, query),
    }),
    route({
      method: 'get',
      path: '/models/:id',
      tag: 'records',
      summary: 'One model: failures by component, how often its machines come in, what takes what with it',
      access: { area: 'records', verb: 'read' },
      params: idParams,
      answer: modelWhole,
      handle: ({ actor, params }) => readModel(deps, actor, params.id),
    }),
  ];
}
