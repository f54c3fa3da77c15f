import { partLife, partLifeQuery } from '../../../shared/parts';
import type { Deps } from '../../deps';
import { route, type Route } from '../../http/route';
import { readPartLife } from './service';

/** How long a component lasts. */
export function partLifeRoutes(deps: Deps): Route[] {
  return [
    route({
      method: 'get',
      path: '/part-life',
      tag: 'analysis',
      summary: 'Life of a component, by model, family and part number',
      access: { area: 'analysis', verb: 'read' },
      query: partLifeQuery,
      answer: partLife,
      handle: ({ actor, query }) => readPartLife(deps, actor, query),
    }),
  ];
}
