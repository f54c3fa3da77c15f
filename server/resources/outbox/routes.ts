import { pageQuery } from '../../../shared/basics';
import { outboxList } from '../../../shared/administration';
import type { Deps } from '../../deps';
import { route, type Route } from '../../http/route';
import { listOutbox } from './service';

export function outboxRoutes(deps: Deps): Route[] {
  return [
    route({
      method: 'get',
      path: '/outbox',
      tag: 'shop',
      summary: 'The mails of this shop and what became of them',
      access: { area: 'administration', verb: 'read' },
      query: pageQuery,
      answer: outboxList,
      handle: ({ actor, query }) => listOutbox(deps, actor, query),
    }),
  ];
}
