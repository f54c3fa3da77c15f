import { pageQuery } from '../../../shared/basics';
import { auditList } from '../../../shared/administration';
import type { Deps } from '../../deps';
import { route, type Route } from '../../http/route';
import { listAudit } from './service';

export function auditRoutes(deps: Deps): Route[] {
  return [
    route({
      method: 'get',
      path: '/audit',
      tag: 'shop',
      summary: 'Who changed what, the latest first',
      access: { area: 'administration', verb: 'read' },
      query: pageQuery,
      answer: auditList,
      handle: ({ actor, query }) => listAudit(deps, actor, query),
    }),
  ];
}
