import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { allRoutes } from '../../server/resources/index';
import { openHouse, type House } from './house';

let house: House;
beforeAll(async () => {
  house = await openHouse();
});
afterAll(() => house.close());

describe('the description of the API', () => {
  it('is OpenAPI 3.1 with every route, who may call it, and a problem for what goes wrong', async () => {
    const { body } = await house.anonymous().get('/api/v1/openapi.json').expect(200);
    expect(body.openapi).toBe('3.1.0');
    for (const { method, path, access } of allRoutes(house.deps)) {
      const operation = body.paths[path.replace(/:(\w+)/g, '{$1}')]?.[method];
      expect(operation, `${method} ${path}`).toBeDefined();
      expect(operation.responses.default.content['application/problem+json'].schema).toEqual({
        $ref: '#/components/schemas/Problem',
      });
      expect(operation.security.length === 0).toBe(access === 'public');
    }
    const operations = Object.values<Record<string, { operationId: string }>>(body.paths).flatMap((path) =>
      Object.values(path).map(({ operationId }) => operationId),
    );
    expect(new Set(operations).size).toBe(operations.length);
    expect(body.paths['/users'].post.requestBody.content['application/json'].schema).toMatchObject({
      required: ['email', 'displayName', 'role'],
      additionalProperties: false,
    });
    expect(body.paths['/users'].post.description).toBe('For: owner.');
  });

  it('has a page to read that loads nothing and runs nothing', async () => {
    const page = await house.anonymous().get('/api/docs').expect(200);
    expect(page.type).toBe('text/html');
    for (const { method, path } of allRoutes(house.deps)) {
      expect(page.text).toContain(`<code>${method.toUpperCase()} ${path.replace(/:(\w+)/g, '{$1}')}</code>`);
    }
    expect(page.text).not.toMatch(/<script|<link|\ssrc=|@import|url\(/);
    expect(page.get('Content-Security-Policy')).toContain("default-src 'self'");
  });
});
