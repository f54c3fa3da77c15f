import { idParams, pageQuery } from '../../../shared/basics';
import { changeShop, session, sessionList, signIn } from '../../../shared/session';
import type { Deps } from '../../deps';
import { AppError } from '../../http/errors';
import { createFailedSignInLimit } from '../../http/failed-sign-ins';
import { route, type Route } from '../../http/route';
import { clearSessionCookie, setSessionCookie } from '../../http/session-token';
import { changeSessionShop, describeSession, findPerson, openSession } from './service';
import { endEverySession, endOneSession, listSessions } from './sessions';

/** Sign-in, sign-out, who am I, another of one's shops, and where else one is signed in. */
export function sessionRoutes(deps: Deps): Route[] {
  const limit = createFailedSignInLimit(() => deps.now());
  return [
    route({
      method: 'post',
      path: '/session',
      tag: 'session',
      summary: 'Sign in',
      access: 'public',
      body: signIn,
      answer: session,
      handle: async ({ body, actor, request, response }) => {
        limit.requireRoom(request, response, body.email);
        const person = await findPerson(deps, body);
        // Guesses sent at one moment pass the first check together; none of them learns more than the tenth.
        limit.requireRoom(request, response, body.email);
        if (!person) {
          limit.note(request, body.email);
          throw new AppError('unauthenticated', 'This e-mail and password do not go together.');
        }
        const opened = await openSession(deps, person, {
          userAgent: request.get('user-agent') ?? '',
          replaces: request.actor?.kind === 'user' ? actor : undefined,
        });
        setSessionCookie(response, opened.session, deps);
        return opened.answer;
      },
    }),
    route({
      method: 'get',
      path: '/session',
      tag: 'session',
      summary: 'Who is signed in, and in which shop',
      access: 'signedIn',
      answer: session,
      handle: ({ actor }) => describeSession(deps, actor),
    }),
    route({
      method: 'patch',
      path: '/session',
      tag: 'session',
      summary: 'Go to another of one’s shops',
      access: 'signedIn',
      body: changeShop,
      answer: session,
      handle: ({ actor, body }) => changeSessionShop(deps, actor, body.shopId),
    }),
    route({
      method: 'delete',
      path: '/session',
      tag: 'session',
      summary: 'Sign out',
      access: 'signedIn',
      handle: async ({ actor, response }) => {
        await endOneSession(deps, actor);
        clearSessionCookie(response, deps.config);
      },
    }),
    route({
      method: 'get',
      path: '/sessions',
      tag: 'session',
      summary: 'Where one is signed in',
      access: 'signedIn',
      query: pageQuery,
      answer: sessionList,
      handle: ({ actor, query }) => listSessions(deps, actor, query),
    }),
    route({
      method: 'delete',
      path: '/sessions',
      tag: 'session',
      summary: 'Sign out everywhere',
      access: 'signedIn',
      handle: async ({ actor, response }) => {
        await endEverySession(deps, actor);
        clearSessionCookie(response, deps.config);
      },
    }),
    route({
      method: 'delete',
      path: '/sessions/:id',
      tag: 'session',
      summary: 'Sign out in one other place',
      access: 'signedIn',
      params: idParams,
      handle: ({ actor, params }) => endOneSession(deps, actor, params.id),
    }),
  ];
}
