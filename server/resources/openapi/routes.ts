import type { RequestHandler } from 'express';
import { route, type Route } from '../../http/route';
import { describeRoutes, type OpenApiDocument } from './document';
import { renderPage } from './page';

/** The description of every route, this one included. */
export function openApiRoutes(others: readonly Route[]): Route[] {
  let document: OpenApiDocument | undefined;
  const own: Route = route({
    method: 'get',
    path: '/openapi.json',
    tag: 'description',
    summary: 'This API as OpenAPI 3.1',
    access: 'public',
    handle: async ({ response }) => {
      document ??= describeRoutes([...others, own]);
      response.json(document);
    },
  });
  return [own];
}

/** The readable page; it lies beside the versions of the API, so it is no route of one. */
export function docsPage(routes: readonly Route[]): RequestHandler {
  let page: string | undefined;
  return (_request, response) => {
    page ??= renderPage(describeRoutes(routes));
    response.type('html').send(page);
  };
}
