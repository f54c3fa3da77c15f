import { assignSpelling, changeTechnician, technician, technicianList } from '../../../shared/administration';
import { idParams, pageQuery } from '../../../shared/basics';
import type { Deps } from '../../deps';
import { route, type Route } from '../../http/route';
import { assignSpelling as assign, changeTechnicianRow, listTechnicians } from './service';

const WRITE = { area: 'administration', verb: 'write' } as const;

/** The technicians of the records, and which spelling means whom. */
export function technicianRoutes(deps: Deps): Route[] {
  return [
    route({
      method: 'get',
      path: '/technicians',
      tag: 'people',
      summary: 'The technicians of the records with their spellings',
      access: { area: 'administration', verb: 'read' },
      query: pageQuery,
      answer: technicianList,
      handle: ({ actor, query }) => listTechnicians(deps, actor, query),
    }),
    route({
      method: 'patch',
      path: '/technicians/:id',
      tag: 'people',
      summary: 'Change a technician’s name, last day, or the person who signs in',
      access: WRITE,
      params: idParams,
      body: changeTechnician,
      answer: technician,
      handle: ({ actor, params, body }) => changeTechnicianRow(deps, actor, params.id, body),
    }),
    route({
      method: 'put',
      path: '/technician-names/:id',
      tag: 'people',
      summary: 'Say which technician a spelling means; their repairs follow',
      access: WRITE,
      params: idParams,
      body: assignSpelling,
      answer: technician,
      handle: ({ actor, params, body }) => assign(deps, actor, params.id, body.technicianId),
    }),
  ];
}
