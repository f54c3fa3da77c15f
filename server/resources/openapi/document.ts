import { OpenApiGeneratorV31, OpenAPIRegistry, type RouteConfig } from '@asteasolutions/zod-to-openapi';
import { z } from 'zod';
import { KEY_SCOPES, mayRead, mayWrite, ROLE_NAMES, ROLES } from '../../../shared/roles';
import type { Access, Route } from '../../http/route';
import { SESSION_COOKIE } from '../../http/session-token';

export type OpenApiDocument = ReturnType<typeof describeRoutes>;

const FILE_TYPES: Record<string, string> = {
  csv: 'text/csv',
  pdf: 'application/pdf',
  xlsx: 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
};

/** The OpenAPI 3.1 document of a route table: what is enforced is what is described. */
export function describeRoutes(routes: readonly Route[]) {
  const registry = new OpenAPIRegistry();
  registry.registerComponent('securitySchemes', 'session', {
    type: 'apiKey',
    in: 'cookie',
    name: SESSION_COOKIE,
  });
  registry.registerComponent('securitySchemes', 'key', { type: 'http', scheme: 'bearer' });
  registerProblem(registry);
  for (const entry of routes) registry.registerPath(describe(entry));
  return new OpenApiGeneratorV31(registry.definitions).generateDocument({
    openapi: '3.1.0',
    info: {
      title: 'Witness Mark',
      version: '1',
      description:
        'JSON in camelCase. Lists, and only lists, answer { data, nextCursor }. Money is integer cents, rates are fractions, instants RFC 3339 UTC, business days YYYY-MM-DD. Errors are RFC 9457 problems.',
    },
    servers: [{ url: '/api/v1' }],
  });
}

/** RFC 9457, as `http/problem.ts` sends it. */
function registerProblem(registry: OpenAPIRegistry): void {
  registry.registerComponent('schemas', 'Problem', {
    type: 'object',
    required: ['type', 'title', 'status', 'detail'],
    properties: {
      type: { type: 'string' },
      title: { type: 'string' },
      status: { type: 'integer' },
      detail: { type: 'string' },
      instance: { type: 'string' },
      errors: {
        type: 'array',
        items: {
          type: 'object',
          required: ['path', 'message'],
          properties: { path: { type: 'string', format: 'json-pointer' }, message: { type: 'string' } },
        },
      },
    },
  });
}

function describe(entry: Route): RouteConfig {
  const body = entry.body && {
    content: { [entry.before?.length ? 'multipart/form-data' : 'application/json']: { schema: entry.body } },
  };
  return {
    method: entry.method,
    path: entry.path.replace(/:(\w+)/g, '{$1}'),
    operationId: operationId(entry),
    summary: entry.summary,
    description: whoMay(entry.access),
    tags: [entry.tag],
    security: securityOf(entry.access),
    request: {
      ...(entry.params instanceof z.ZodObject ? { params: entry.params } : {}),
      ...(entry.query instanceof z.ZodObject ? { query: entry.query } : {}),
      ...(body ? { body } : {}),
    },
    responses: {
      [entry.status ?? (entry.answer || fileTypeOf(entry) ? 200 : 204)]: answerOf(entry),
      default: {
        description: 'A problem',
        content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } },
      },
    },
  };
}

function answerOf(entry: Route): RouteConfig['responses'][string] {
  const fileType = fileTypeOf(entry);
  if (entry.answer) return { description: 'Done', content: { 'application/json': { schema: entry.answer } } };
  return { description: 'Done', ...(fileType ? { content: { [fileType]: { schema: z.string() } } } : {}) };
}

const fileTypeOf = ({ path }: Route) => FILE_TYPES[path.split('.').at(-1) ?? ''];

function operationId({ method, path }: Route): string {
  const words = path.split(/[^A-Za-z0-9]+/).filter((word) => word !== '');
  return method + words.map((word) => word.charAt(0).toUpperCase() + word.slice(1)).join('');
}

function grantees(access: Exclude<Access, string>) {
  const may = access.verb === 'read' ? mayRead : mayWrite;
  return {
    roles: ROLES.filter((role) => may(role, access.area)),
    scopes: KEY_SCOPES.filter((scope) => may(`key:${scope}`, access.area)),
  };
}

function securityOf(access: Access): Record<string, string[]>[] {
  if (access === 'public') return [];
  if (access === 'signedIn') return [{ session: [] }];
  const { roles, scopes } = grantees(access);
  return [...(roles.length > 0 ? [{ session: [] }] : []), ...(scopes.length > 0 ? [{ key: [] }] : [])];
}

/** Who may call a route, in words. */
export function whoMay(access: Access): string {
  if (access === 'public') return 'Anybody.';
  if (access === 'signedIn') return 'Everybody who is signed in.';
  const { roles, scopes } = grantees(access);
  const names = [
    ...roles.map((role) => ROLE_NAMES[role]),
    ...scopes.map((scope) => `keys that may ${scope}`),
  ];
  return `For: ${names.join(', ')}.`;
}
