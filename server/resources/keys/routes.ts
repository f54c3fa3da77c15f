import { idParams, pageQuery } from '../../../shared/basics';
import { apiKeyList, createApiKey, createdApiKey } from '../../../shared/administration';
import type { Deps } from '../../deps';
import { route, type Route } from '../../http/route';
import { createKey, listKeys, revokeKey } from './service';

/** The keys that programs send. */
export function keyRoutes(deps: Deps): Route[] {
  return [
    route({
      method: 'get',
      path: '/keys',
      tag: 'keys',
      summary: 'The keys of this shop, without the keys themselves',
      access: { area: 'administration', verb: 'read' },
      query: pageQuery,
      answer: apiKeyList,
      handle: ({ actor, query }) => listKeys(deps, actor, query),
    }),
    route({
      method: 'post',
      path: '/keys',
      tag: 'keys',
      summary: 'Make a key; this answer alone shows it',
      access: { area: 'administration', verb: 'write' },
      body: createApiKey,
      answer: createdApiKey,
      status: 201,
      handle: ({ actor, body }) => createKey(deps, actor, body),
    }),
    route({
      method: 'delete',
      path: '/keys/:id',
      tag: 'keys',
      summary: 'Revoke a key at once and for good',
      access: { area: 'administration', verb: 'write' },
      params: idParams,
      handle: ({ actor, params }) => revokeKey(deps, actor, params.id),
    }),
  ];
}
