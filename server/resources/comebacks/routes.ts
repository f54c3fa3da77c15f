import { idParams } from '../../../shared/basics';
import { comeback, comebackList, comebackQuery, decideComeback } from '../../../shared/comebacks';
import type { Deps } from '../../deps';
import { route, type Route } from '../../http/route';
import { decide } from './decide';
import { listComebacks } from './service';

/** Machines that came back for the same trouble, and what people say of it. */
export function comebackRoutes(deps: Deps): Route[] {
  return [
    route({
      method: 'get',
      path: '/comebacks',
      tag: 'comebacks',
      summary: 'Comebacks by the work date of the first repair, newest first; a technician sees their own',
      access: { area: 'comebacks', verb: 'read' },
      query: comebackQuery,
      answer: comebackList,
      handle: ({ actor, query }) => listComebacks(deps, actor, query),
    }),
    route({
      method: 'patch',
      path: '/comebacks/:id',
      tag: 'comebacks',
      summary: 'Confirm, dismiss, give a reason, or attach to another repair; the id is the return’s',
      access: { area: 'comebacks', verb: 'write' },
      params: idParams,
      body: decideComeback,
      answer: comeback,
      handle: ({ actor, params, body }) => decide(deps, actor, params.id, body),
    }),
  ];
}
