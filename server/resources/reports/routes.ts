import {
  meanCumulativeList,
  meanQuery,
  meanTimeList,
  monthQuery,
  monthReview,
  rateList,
  rateQuery,
} from '../../../shared/reports';
import type { Deps } from '../../deps';
import { route, type Route } from '../../http/route';
import { reportComebackRate } from './comeback-rate';
import { reviewMonth } from './month';
import { reportMeanCumulative, reportMeanTimeBetween } from './recurrence';

const rates = { area: 'rates', verb: 'read' } as const;

/** Figures over many repairs. */
export function reportRoutes(deps: Deps): Route[] {
  return [
    route({
      method: 'get',
      path: '/reports/comeback-rate',
      tag: 'reports',
      summary: 'Comeback rates by month, model, component or technician',
      access: rates,
      query: rateQuery,
      answer: rateList,
      handle: ({ actor, query }) => reportComebackRate(deps, actor, query),
    }),
    route({
      method: 'get',
      path: '/reports/month',
      tag: 'reports',
      summary: 'The review of a month of work: the latest that can be judged, or another',
      access: rates,
      query: monthQuery,
      answer: monthReview,
      handle: ({ actor, query }) => reviewMonth(deps, actor, query),
    }),
    route({
      method: 'get',
      path: '/reports/mtbf',
      tag: 'reports',
      summary: 'Mean days between repairs of a machine, by model',
      access: { area: 'analysis', verb: 'read' },
      query: meanQuery,
      answer: meanTimeList,
      handle: ({ actor, query }) => reportMeanTimeBetween(deps, actor, query),
    }),
    route({
      method: 'get',
      path: '/reports/mean-cumulative',
      tag: 'reports',
      summary: 'Mean number of repairs of a machine by its age, by model',
      access: { area: 'analysis', verb: 'read' },
      query: meanQuery,
      answer: meanCumulativeList,
      handle: ({ actor, query }) => reportMeanCumulative(deps, actor, query),
    }),
  ];
}
