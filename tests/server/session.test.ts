import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openHouse, type House, type TestShop } from './house';

let house: House;
let shop: TestShop;

beforeAll(async () => {
  house = await openHouse();
  shop = await house.makeShop();
});
afterAll(() => house.close());

describe('signing in', () => {
  it('opens a session that says who and where, and ends it', async () => {
    const agent = await shop.as('owner');
    const me = await agent.get('/api/v1/session');
    expect(me.body).toMatchObject({
      user: { email: shop.person('owner').email },
      shop: { id: shop.id, role: 'owner' },
    });
    await agent.delete('/api/v1/session').expect(204);
    await agent.get('/api/v1/session').expect(401);
  });

  it('says the same of a wrong password and of an unknown e-mail', async () => {
    const wrong = await house
      .anonymous()
      .post('/api/v1/session')
      .send({ email: shop.person('owner').email, password: 'not this one' });
    const nobody = await house
      .anonymous()
      .post('/api/v1/session')
      .send({ email: 'nobody@shop.example', password: 'not this one' });
    expect(wrong.status).toBe(401);
    expect(nobody.body).toEqual(wrong.body);
    expect(wrong.type).toBe('application/problem+json');
  });

  it('refuses unsafe requests that another site’s page sends', async () => {
    const agent = await shop.as('owner');
    await agent.delete('/api/v1/session').set('Origin', 'https://elsewhere.example').expect(403);
    await agent.delete('/api/v1/session').set('Sec-Fetch-Site', 'cross-site').expect(403);
    await agent.get('/api/v1/session').expect(200);
  });
});
