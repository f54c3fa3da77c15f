import { idParams, pageQuery } from '../../../shared/basics';
import { changeMember, inviteMember, member, memberList } from '../../../shared/administration';
import type { Deps } from '../../deps';
import { route, type Route } from '../../http/route';
import { invite, inviteAgain } from './invite';
import { changePerson, listPeople } from './service';

const READ = { area: 'administration', verb: 'read' } as const;
const WRITE = { area: 'administration', verb: 'write' } as const;

/** The people of a shop. */
export function peopleRoutes(deps: Deps): Route[] {
  return [
    route({
      method: 'get',
      path: '/users',
      tag: 'people',
      summary: 'The people of this shop',
      access: READ,
      query: pageQuery,
      answer: memberList,
      handle: ({ actor, query }) => listPeople(deps, actor, query),
    }),
    route({
      method: 'post',
      path: '/users',
      tag: 'people',
      summary: 'Invite a person by e-mail',
      access: WRITE,
      body: inviteMember,
      answer: member,
      status: 201,
      handle: ({ actor, body }) => invite(deps, actor, body),
    }),
    route({
      method: 'patch',
      path: '/users/:id',
      tag: 'people',
      summary: 'Change a person’s name, role or technician, or switch them off',
      access: WRITE,
      params: idParams,
      body: changeMember,
      answer: member,
      handle: ({ actor, params, body }) => changePerson(deps, actor, params.id, body),
    }),
    route({
      method: 'post',
      path: '/users/:id/invitation',
      tag: 'people',
      summary: 'Mail the invitation again',
      access: WRITE,
      params: idParams,
      handle: ({ actor, params }) => inviteAgain(deps, actor, params.id),
    }),
  ];
}
