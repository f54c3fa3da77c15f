import type { NextFunction, Request, RequestHandler, Response, Router } from 'express';
import type { z } from 'zod';
import { mayRead, mayWrite, type Area } from '../../shared/roles';
import { granteesOf, type Actor } from './actor';
import { AppError, forbidden } from './errors';
import { parseInput } from './problem';

export type Method = 'get' | 'post' | 'put' | 'patch' | 'delete';

/** `public` needs nobody, `signedIn` anybody with a session; the rest is a row of the matrix and a verb. */
export type Access = 'public' | 'signedIn' | { area: Area; verb: 'read' | 'write' };

type Parsed<Schema extends z.ZodType | undefined> = Schema extends z.ZodType ? z.output<Schema> : undefined;

export type RouteSpec<
  Params extends z.ZodType | undefined,
  Query extends z.ZodType | undefined,
  Body extends z.ZodType | undefined,
> = {
  method: Method;
  /** Below `/api/v1`, with Express parameters: `/repairs/:id`. */
  path: string;
  summary: string;
  tag: string;
  access: Access;
  params?: Params;
  query?: Query;
  body?: Body;
  /** Documented answer and its status (200, or 204 without one). */
  answer?: z.ZodType;
  status?: number;
  /** Parsers that come before the body is validated, such as a multipart reader. */
  before?: readonly RequestHandler[];
  /** What it returns is sent as JSON; `undefined` after it answered itself, or for 204. */
  handle: (input: {
    params: Parsed<Params>;
    query: Parsed<Query>;
    body: Parsed<Body>;
    actor: Actor;
    request: Request;
    response: Response;
  }) => Promise<unknown>;
};

/** A route as the matrix test, the OpenAPI document and the router see it. */
export type Route = Omit<
  RouteSpec<z.ZodType | undefined, z.ZodType | undefined, z.ZodType | undefined>,
  'handle'
> & {
  run: (request: Request, response: Response) => Promise<void>;
};

export function route<
  Params extends z.ZodType | undefined = undefined,
  Query extends z.ZodType | undefined = undefined,
  Body extends z.ZodType | undefined = undefined,
>(spec: RouteSpec<Params, Query, Body>): Route {
  const { handle, ...rest } = spec;
  return {
    ...rest,
    run: async (request, response) => {
      const params = spec.params && parseInput(spec.params, request.params, 'address');
      const query = spec.query && parseInput(spec.query, request.query, 'query');
      if (spec.body && !spec.before) requireJson(request);
      const body = spec.body && parseInput(spec.body, request.body ?? {}, 'body');
      const answer = await handle({
        params: params as Parsed<Params>,
        query: query as Parsed<Query>,
        body: body as Parsed<Body>,
        // Public routes have no actor and do not ask for one.
        actor: request.actor as Actor,
        request,
        response,
      });
      if (response.headersSent) return;
      if (answer === undefined) response.status(spec.status ?? 204).end();
      else response.status(spec.status ?? 200).json(answer);
    },
  };
}

export function mountRoutes(router: Router, routes: readonly Route[]): void {
  for (const entry of routes) {
    router[entry.method](
      entry.path,
      requireAccess(entry.access),
      ...(entry.before ?? []),
      (request, response) => entry.run(request, response),
    );
  }
}

/** A body of another kind was not read, and must not pass for an empty one. */
function requireJson(request: Request): void {
  const isSent = request.get('transfer-encoding') !== undefined || Number(request.get('content-length')) > 0;
  if (isSent && !request.is('json')) throw new AppError('unsupported', 'Send JSON in UTF-8.');
}

function requireAccess(access: Access) {
  return (request: Request, _response: Response, next: NextFunction) => {
    if (access === 'public') return next();
    const { actor } = request;
    if (!actor) throw new AppError('unauthenticated', 'Sign in first, or send a key.');
    if (access === 'signedIn') {
      if (actor.kind !== 'user') throw forbidden('This is for people who are signed in.');
      return next();
    }
    const may = access.verb === 'read' ? mayRead : mayWrite;
    if (!granteesOf(actor).some((grantee) => may(grantee, access.area))) {
      request.log?.warn({ area: access.area, verb: access.verb }, 'denied');
      throw forbidden();
    }
    next();
  };
}
