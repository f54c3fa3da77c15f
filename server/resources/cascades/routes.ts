import { idParams } from '../../../shared/basics';
import { cascadeQuery, findingList, findingSummary, findingWhole } from '../../../shared/findings';
import type { Deps } from '../../deps';
import { route, type Route } from '../../http/route';
import { listFindings, readFinding, summarizeFindings } from './service';

const mayRead = { area: 'analysis', verb: 'read' } as const;

/** What takes what with it. */
export function cascadeRoutes(deps: Deps): Route[] {
  return [
    route({
      method: 'get',
      path: '/cascades',
      tag: 'analysis',
      summary: 'All pairs that the records support, as of the last finished analysis; never paged',
      access: mayRead,
      query: cascadeQuery,
      answer: findingList,
      handle: ({ actor, query }) => listFindings(deps, actor, query),
    }),
    route({
      method: 'get',
      path: '/cascades/summary',
      tag: 'analysis',
      summary: 'How many pairs were examined, and what was seen too few times to claim',
      access: mayRead,
      answer: findingSummary,
      handle: ({ actor }) => summarizeFindings(deps, actor),
    }),
    route({
      method: 'get',
      path: '/cascades/:id',
      tag: 'analysis',
      summary: 'One pair with the episodes behind it, for and against',
      access: mayRead,
      params: idParams,
      answer: findingWhole,
      handle: ({ actor, params }) => readFinding(deps, actor, params.id),
    }),
  ];
}
