import jwt from 'jsonwebtoken';
import supertest, { type Response } from 'supertest';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { createApp } from '../../server/app';
import { IDLE_HOURS, LONGEST_DAYS, SESSION_COOKIE } from '../../server/http/session-token';
import { ROLES } from '../../shared/roles';
import { openHouse, type House, type TestShop } from './house';

let house: House;
let shop: TestShop;
const realNow = () => new Date();
const HOUR_MS = 3_600_000;

beforeAll(async () => {
  house = await openHouse();
  shop = await house.makeShop();
});
afterEach(() => {
  house.deps.now = realNow;
});
afterAll(() => house.close());

const later = (hours: number) => {
  const then = new Date(Date.now() + hours * HOUR_MS);
  house.deps.now = () => then;
};

const signIn = (email: string, password: string) =>
  house.anonymous().post('/api/v1/session').send({ email, password });

const cookieOf = (answer: Response) => String(answer.get('Set-Cookie')?.[0] ?? '');
const withToken = (token: string) =>
  house.anonymous().get('/api/v1/session').set('Cookie', `${SESSION_COOKIE}=${token}`);

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
    const wrong = await signIn(shop.person('owner').email, 'not this one');
    const nobody = await signIn('nobody@shop.example', 'not this one');
    expect(wrong.status).toBe(401);
    expect(nobody.body).toEqual(wrong.body);
    expect(wrong.type).toBe('application/problem+json');
  });

  it('refuses unsafe requests that another site’s page sends', async () => {
    const agent = await shop.as('owner');
    await agent.delete('/api/v1/session').set('Origin', 'https://elsewhere.example').expect(403);
    await agent.delete('/api/v1/session').set('Sec-Fetch-Site', 'cross-site').expect(403);
    await agent.get('/api/v1/session').expect(200);
    await agent.delete('/api/v1/session').set('Origin', house.deps.config.publicUrl).expect(204);
  });

  it('sets a cookie that scripts and other sites do not get, over https alone where that is the address', async () => {
    const { email } = shop.person('owner');
    const plain = cookieOf(await signIn(email, shop.password));
    expect(plain).toMatch(/; Path=\/;.*HttpOnly; SameSite=Lax$/);
    expect(plain).not.toMatch(/Secure|Domain/);
    expect(plain).toContain(`Max-Age=${IDLE_HOURS * 3600};`);

    const config = { ...house.deps.config, publicUrl: 'https://shop.example', isHttps: true };
    const secure = await supertest(createApp({ ...house.deps, config }))
      .post('/api/v1/session')
      .send({ email, password: shop.password });
    expect(cookieOf(secure)).toMatch(/; Path=\/;.*HttpOnly; Secure; SameSite=Lax$/);
    expect(secure.get('Strict-Transport-Security')).toBeDefined();
  });

  it('ends the session that the same browser had before', async () => {
    const { email } = shop.person('counter');
    const first = cookieOf(await signIn(email, shop.password)).split(';')[0] ?? '';
    const second = await signIn(email, shop.password).set('Cookie', first);
    expect(cookieOf(second).split(';')[0]).not.toBe(first);
    await house.anonymous().get('/api/v1/session').set('Cookie', first).expect(401);
  });
});

describe('the token', () => {
  it('is signed, names a session, and holds nothing else', async () => {
    const answer = await signIn(shop.person('owner').email, shop.password);
    const token = /witness_session=([^;]+)/.exec(cookieOf(answer))?.[1] ?? '';
    expect(jwt.decode(token, { complete: true })).toMatchObject({ header: { alg: 'HS256' } });
    const payload = jwt.verify(token, house.deps.sessionSecret, { algorithms: ['HS256'] });
    expect(Object.keys(payload).sort()).toEqual(['exp', 'sid']);
    const { sid, exp } = payload as { sid: string; exp: number };
    await withToken(token).expect(200);

    const secret = house.deps.sessionSecret;
    const forged = {
      'with another secret': jwt.sign({ sid, exp }, 'another secret that is long enough'),
      unsigned: jwt.sign({ sid, exp }, '', { algorithm: 'none' }),
      'with another algorithm': jwt.sign({ sid, exp }, secret, { algorithm: 'HS512' }),
      expired: jwt.sign({ sid, exp: Math.floor(Date.now() / 1000) - 1 }, secret),
      'for no session': jwt.sign({ exp }, secret),
      'for no id': jwt.sign({ sid: `${sid}' OR true`, exp }, secret),
      changed: token.replace(/\.[^.]+\./, (part) => `.${part.slice(1, -1)}A.`),
    };
    for (const [how, bad] of Object.entries(forged)) expect((await withToken(bad)).status, how).toBe(401);
  });
});

describe('a session', () => {
  it('is renewed by use and ends after eight idle hours', async () => {
    const agent = await shop.as('owner');
    later(7);
    expect(cookieOf(await agent.get('/api/v1/session'))).toContain(`Max-Age=${IDLE_HOURS * 3600};`);
    later(14);
    await agent.get('/api/v1/session').expect(200);
    later(14 + IDLE_HOURS + 0.01);
    await agent.get('/api/v1/session').expect(401);
  });

  it('ends after fourteen days however much it is used, and its cookie no later', async () => {
    const answer = await signIn(shop.person('owner').email, shop.password);
    // A cookie jar would drop the cookie by the real clock, so it is sent by hand.
    const cookie = cookieOf(answer).split(';')[0] ?? '';
    const me = () => house.anonymous().get('/api/v1/session').set('Cookie', cookie);
    const longestHours = LONGEST_DAYS * 24;
    for (let hours = 7; hours < longestHours; hours += 7) {
      later(hours);
      expect((await me()).status, `${hours} hours`).toBe(200);
    }
    later(longestHours - 0.5);
    const maxAge = Number(/Max-Age=(\d+)/.exec(cookieOf(await me()))?.[1]);
    expect(maxAge).toBeGreaterThan(0);
    expect(maxAge).toBeLessThanOrEqual(1800);
    later(longestHours + 0.01);
    await me().expect(401);
  });

  it('is listed with the person’s others, and each can be ended from any', async () => {
    const here = await shop.as('technician');
    const there = await shop.as('technician');
    const stranger = await shop.as('owner');
    const list = await here.get('/api/v1/sessions');
    expect(list.body.data).toHaveLength(2);
    const other = list.body.data.find(({ isCurrent }: { isCurrent: boolean }) => !isCurrent);
    await stranger.delete(`/api/v1/sessions/${other.id}`).expect(404);
    await there.get('/api/v1/session').expect(200);
    await here.delete(`/api/v1/sessions/${other.id}`).expect(204);
    await there.get('/api/v1/session').expect(401);
    await here.get('/api/v1/session').expect(200);
  });

  it('can be ended everywhere at once', async () => {
    const here = await shop.as('accountant');
    const there = await shop.as('accountant');
    await here.delete('/api/v1/sessions').expect(204);
    await here.get('/api/v1/session').expect(401);
    await there.get('/api/v1/session').expect(401);
  });

  it('goes to another of the person’s shops and to no other', async () => {
    const other = await house.makeShop({ roles: [] });
    const agent = await shop.as('service_manager');
    await agent.patch('/api/v1/session').send({ shopId: other.id }).expect(404);
    await house.migrator.query(`INSERT INTO memberships (shop_id, user_id, role) VALUES ($1, $2, 'owner')`, [
      other.id,
      shop.person('service_manager').userId,
    ]);
    const changed = await agent.patch('/api/v1/session').send({ shopId: other.id });
    expect(changed.body.shop).toMatchObject({ id: other.id, role: 'owner' });
    await agent.get('/api/v1/shop').expect(200);
  });
});

describe('trying passwords', () => {
  it('is stopped after ten failures for one person, and not for the next one', async () => {
    const guarded = await house.makeShop();
    const { email } = guarded.person('owner');
    for (let attempt = 0; attempt < 10; attempt += 1) await signIn(email, 'wrong').expect(401);
    const stopped = await signIn(` ${email.toUpperCase()}`, guarded.password);
    expect(stopped.status).toBe(429);
    expect(Number(stopped.get('Retry-After'))).toBeGreaterThan(0);
    await signIn(guarded.person('counter').email, guarded.password).expect(200);
    later(0.26);
    await signIn(email, guarded.password).expect(200);
  });

  it('learns no more from guesses that are sent all at once', async () => {
    const guarded = await house.makeShop({ roles: ['owner'] });
    const guesses = await Promise.all(
      Array.from({ length: 40 }, () => signIn(guarded.person('owner').email, 'wrong')),
    );
    expect(guesses.filter(({ status }) => status === 401)).toHaveLength(10);
    expect(guesses.filter(({ status }) => status === 429)).toHaveLength(30);
  });

  it('holds up nobody who knows their password, however many sign in at once', async () => {
    const busy = await house.makeShop({ roles: ['owner'] });
    const answers = await Promise.all(
      Array.from({ length: 150 }, () => signIn(busy.person('owner').email, busy.password)),
    );
    expect(new Set(answers.map(({ status }) => status))).toEqual(new Set([200]));
  });

  it('is stopped after a hundred failures from one address', async () => {
    const fresh = createApp(house.deps);
    const attempt = (email: string, password: string) =>
      supertest(fresh).post('/api/v1/session').send({ email, password });
    for (const guarded of [await house.makeShop(), await house.makeShop()]) {
      for (const role of ROLES) {
        const { email } = guarded.person(role);
        for (let guess = 0; guess < 10; guess += 1) await attempt(email, 'wrong').expect(401);
      }
    }
    await attempt(shop.person('owner').email, shop.password).expect(429);
  });
});
