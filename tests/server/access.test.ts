import { randomUUID } from 'node:crypto';
import type supertest from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Route } from '../../server/http/route';
import { allRoutes } from '../../server/resources/index';
import { AREAS, permissionOf, ROLES, type Area, type Grantee } from '../../shared/roles';
import { openHouse, type House, type TestShop } from './house';

// The contract's table, typed by hand from its text: owner, service manager, technician, counter, accountant,
// key `read`, key `import`.
const WHO = [
  'owner',
  'service_manager',
  'technician',
  'counter',
  'accountant',
  'key:read',
  'key:import',
] as const;
const CONTRACT: Record<Area, string> = {
  records: 'rw rw r r r r -',
  visits: 'rw rw rw - - - -',
  analysis: 'r r r - r r -',
  lookup: 'rw rw rw rw - - -',
  comebacks: 'rw rw own - r r -',
  rates: 'r r r - r r -',
  technicianRates: 'r r own - - - -',
  imports: 'rw rw - - r r rw',
  dictionary: 'rw rw r - r - -',
  claims: 'rw rw - - r - -',
  credits: 'rw r - - rw - -',
  season: 'rw rw r - r r -',
  administration: 'rw - - - - - -',
};

let house: House;
let shop: TestShop;
beforeAll(async () => {
  house = await openHouse();
  shop = await house.makeShop();
});
afterAll(() => house.close());

const contractOf = (who: Grantee, area: Area) => CONTRACT[area].split(' ')[WHO.indexOf(who)] ?? '';

function isAllowed(who: Grantee, { access }: Route): boolean {
  if (access === 'public') return true;
  if (access === 'signedIn') return !who.startsWith('key:');
  const granted = contractOf(who, access.area);
  return access.verb === 'write' ? granted === 'rw' : granted !== '-';
}

/** The request that a route takes, with ids of nothing and an empty body. */
function call(agent: Pick<supertest.Agent, Route['method']>, entry: Route, authorization?: string) {
  const address = `/api/v1${entry.path.replace(/:(\w+)/g, () => randomUUID())}`;
  const request = agent[entry.method](address);
  return authorization ? request.set('Authorization', authorization) : request;
}

const nameOf = ({ method, path }: Route) => `${method.toUpperCase()} ${path}`;

/** Every route's answer to one asker, as "allowed" or the refusal. */
async function walk(ask: (entry: Route) => Promise<supertest.Response>) {
  const answers: Record<string, string> = {};
  for (const entry of allRoutes(house.deps)) {
    const { status } = await ask(entry);
    answers[nameOf(entry)] = status >= 500 || [401, 403].includes(status) ? String(status) : 'allowed';
  }
  return answers;
}

const expected = (tell: (entry: Route) => string) =>
  Object.fromEntries(allRoutes(house.deps).map((entry) => [nameOf(entry), tell(entry)]));

describe('who may what', () => {
  it.each(AREAS)('is enforced from the table of the contract: %s', (area) => {
    expect(WHO.map((who) => permissionOf(who, area)).join(' ')).toBe(CONTRACT[area]);
  });

  it.each(ROLES)('holds on every route for the %s', async (role) => {
    // Some routes sign out, everywhere at that: each is asked in a session of its own.
    const answers = await walk(async (entry) => call(await shop.as(role), entry));
    expect(answers).toEqual(expected((entry) => (isAllowed(role, entry) ? 'allowed' : '403')));
  });

  it.each(['read', 'import'] as const)('holds on every route for a key that may %s', async (scope) => {
    const key = await shop.key(scope);
    const answers = await walk((entry) => call(house.anonymous(), entry, key).then((answer) => answer));
    expect(answers).toEqual(expected((entry) => (isAllowed(`key:${scope}`, entry) ? 'allowed' : '403')));
  });

  it('asks everybody else to sign in', async () => {
    const answers = await walk((entry) => call(house.anonymous(), entry).then((answer) => answer));
    // Signing in with nothing is a body that cannot be used, so no public route answers 401 here.
    expect(answers).toEqual(expected(({ access }) => (access === 'public' ? 'allowed' : '401')));
  });

  it('knows no key that was made up or revoked', async () => {
    await house.anonymous().get('/api/v1/repairs').set('Authorization', 'Bearer made-up').expect(401);
    const key = await shop.key('read');
    await house.anonymous().get('/api/v1/repairs').set('Authorization', key).expect(200);
    await house.migrator.query('UPDATE api_keys SET revoked_at = now() WHERE shop_id = $1', [shop.id]);
    await house.anonymous().get('/api/v1/repairs').set('Authorization', key).expect(401);
  });
});

describe('an address or body that is not known', () => {
  it('is a problem', async () => {
    for (const address of ['/api/v1/nothing-here', '/api/v2', '/api/nothing']) {
      const answer = await house.anonymous().get(address);
      expect(answer.status).toBe(404);
      expect(answer.type).toBe('application/problem+json');
      expect(answer.body).toMatchObject({ type: 'about:blank', title: 'Not found', status: 404 });
    }
  });

  it('is told field by field, unknown ones included', async () => {
    const owner = await shop.as('owner');
    const answer = await owner.post('/api/v1/keys').send({ name: '', scopes: ['all'], 'a/b': 1 });
    expect(answer.status).toBe(400);
    expect(answer.body.errors.map(({ path }: { path: string }) => path).sort()).toEqual([
      '/a~1b',
      '/name',
      '/scopes/0',
    ]);
    await owner.post('/api/v1/keys').set('Content-Type', 'application/json').send('{').expect(400);
    const query = await owner.get('/api/v1/users?limit=0&other=1');
    expect(query.status).toBe(400);
  });
});
