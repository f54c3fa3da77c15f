import { idParams, pageQuery } from '../../../shared/basics';
import { family, familyList, saveFamily } from '../../../shared/administration';
import type { Deps } from '../../deps';
import { route, type Route } from '../../http/route';
import { createFamily, listFamilies, removeFamily, replaceFamily } from './service';

const WRITE = { area: 'dictionary', verb: 'write' } as const;

/** Models that the shop says share a deck, an engine or a clutch. */
export function familyRoutes(deps: Deps): Route[] {
  return [
    route({
      method: 'get',
      path: '/families',
      tag: 'dictionary',
      summary: 'The families of models',
      access: { area: 'dictionary', verb: 'read' },
      query: pageQuery,
      answer: familyList,
      handle: ({ actor, query }) => listFamilies(deps, actor, query),
    }),
    route({
      method: 'post',
      path: '/families',
      tag: 'dictionary',
      summary: 'Say that models are a family; asks for a new analysis',
      access: WRITE,
      body: saveFamily,
      answer: family,
      status: 201,
      handle: ({ actor, body }) => createFamily(deps, actor, body),
    }),
    route({
      method: 'put',
      path: '/families/:id',
      tag: 'dictionary',
      summary: 'Replace a family’s name and models; asks for a new analysis',
      access: WRITE,
      params: idParams,
      body: saveFamily,
      answer: family,
      handle: ({ actor, params, body }) => replaceFamily(deps, actor, params.id, body),
    }),
    route({
      method: 'delete',
      path: '/families/:id',
      tag: 'dictionary',
      summary: 'Say that they are no family; asks for a new analysis',
      access: WRITE,
      params: idParams,
      handle: ({ actor, params }) => removeFamily(deps, actor, params.id),
    }),
  ];
}
