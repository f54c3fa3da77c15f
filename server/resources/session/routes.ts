import rateLimit from 'express-rate-limit';
import { changeShop, session, signIn } from '../../../shared/session';
import type { Deps } from '../../deps';
import { AppError } from '../../http/errors';
import { route, type Route } from '../../http/route';
import { clearSessionCookie, setSessionCookie, signSessionToken } from '../../http/session-token';
import { changeSessionShop, describeSession, endSession, openSession } from './service';

/** Sign-in, sign-out, who am I, and another of one's shops. */
export function sessionRoutes(deps: Deps): Route[] {
  return [
    route({
      method: 'post',
      path: '/session',
      tag: 'session',
      summary: 'Sign in',
      access: 'public',
      before: [failedSignInLimiter()],
      body: signIn,
      answer: session,
      handle: async ({ body, request, response }) => {
        const opened = await openSession(deps, body, request.get('user-agent') ?? '');
        setSessionCookie(response, signSessionToken(opened.sessionId, deps.sessionSecret), deps.config);
        return opened.session;
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
        await endSession(deps, actor);
        clearSessionCookie(response, deps.config);
      },
    }),
  ];
}

/** Only failed sign-ins count: ten in a quarter of an hour for one address and e-mail. */
function failedSignInLimiter() {
  return rateLimit({
    windowMs: 15 * 60_000,
    limit: 10,
    skipSuccessfulRequests: true,
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    keyGenerator: (request) => {
      const body: unknown = request.body;
      const email = body && typeof body === 'object' && 'email' in body ? String(body.email) : '';
      return `${request.ip}|${email.trim().toLowerCase()}`;
    },
    validate: { keyGeneratorIpFallback: false },
    handler: () => {
      throw new AppError('tooMany', 'Too many failed sign-ins. Try again in a quarter of an hour.');
    },
  });
}
