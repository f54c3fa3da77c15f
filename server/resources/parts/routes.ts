import { idParams } from '../../../shared/basics';
import { partList, partListed, partQuery } from '../../../shared/parts';
import type { Deps } from '../../deps';
import { route, type Route } from '../../http/route';
import { listParts, readPart } from './service';

/** Part numbers, what they are and what supersedes them. */
export function partRoutes(deps: Deps): Route[] {
  return [
    route({
      method: 'get',
      path: '/parts',
      tag: 'records',
      summary: 'Part numbers by maker and number',
      access: { area: 'records', verb: 'read' },
      query: partQuery,
      answer: partList,
      handle: ({ actor, query }) => listParts(deps, actor, query),
    }),
    route({
      method: 'get',
      path: '/parts/:id',
      tag: 'records',
      summary: 'One part number',
      access: { area: 'records', verb: 'read' },
      params: idParams,
      answer: partListed,
      handle: ({ actor, params }) => readPart(deps, actor, params.id),
    }),
  ];
}
