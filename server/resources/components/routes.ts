import { idParams } from '../../../shared/basics';
import { changeComponent, componentList, componentListed, componentQuery } from '../../../shared/parts';
import type { Deps } from '../../deps';
import { route, type Route } from '../../http/route';
import { changeOneComponent } from './change';
import { listComponents, readComponent } from './service';

/** What parts are, whichever number they bear. */
export function componentRoutes(deps: Deps): Route[] {
  return [
    route({
      method: 'get',
      path: '/components',
      tag: 'records',
      summary: 'Components by name, in all or on one model',
      access: { area: 'records', verb: 'read' },
      query: componentQuery,
      answer: componentList,
      handle: ({ actor, query }) => listComponents(deps, actor, query),
    }),
    route({
      method: 'get',
      path: '/components/:id',
      tag: 'records',
      summary: 'One component',
      access: { area: 'records', verb: 'read' },
      params: idParams,
      answer: componentListed,
      handle: ({ actor, params }) => readComponent(deps, actor, params.id),
    }),
    route({
      method: 'patch',
      path: '/components/:id',
      tag: 'records',
      summary: 'Name it, put it into a system, or say when it is changed',
      access: { area: 'records', verb: 'write' },
      params: idParams,
      body: changeComponent,
      answer: componentListed,
      handle: ({ actor, params, body }) => changeOneComponent(deps, actor, params.id, body),
    }),
  ];
}
