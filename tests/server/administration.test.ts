import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { openHouse, type House, type TestShop } from './house';

let house: House;
let shop: TestShop;
let owner: Awaited<ReturnType<TestShop['as']>>;
const API = '/api/v1';
const PASSWORD = 'gravel under a blue gate';

beforeAll(async () => {
  house = await openHouse();
  shop = await house.makeShop();
  owner = await shop.as('owner');
});
afterAll(() => house.close());

type Person = { id: string; userId: string; email: string; role: string };
async function personOf(agent: typeof owner, email: string): Promise<Person> {
  const { body } = await agent.get(`${API}/users`);
  const found = body.data.find((person: Person) => person.email === email);
  if (!found) throw new Error(`nobody has ${email}`);
  return found;
}

const tokenMailedTo = (email: string, count = 1) =>
  vi.waitFor(
    async () => {
      const mails = (await house.outbox.messages()).filter(({ to }) => to === email);
      expect(mails).toHaveLength(count);
      return /token=(\S+)/.exec(mails.at(-1)?.text ?? '')?.[1] ?? '';
    },
    { timeout: 20_000, interval: 100 },
  );

async function lastAudit(agent = owner) {
  const { body } = await agent.get(`${API}/audit?limit=1`);
  return body.data[0];
}

describe('people', () => {
  it('are invited by mail, choose a password, and sign in', async () => {
    const email = 'new.person@shop.example';
    const invited = await owner
      .post(`${API}/users`)
      .send({ email: 'New.Person@shop.example', displayName: 'New Person', role: 'technician' });
    expect(invited.status).toBe(201);
    expect(invited.body).toMatchObject({ email, role: 'technician', hasPassword: false, isDisabled: false });
    expect(await lastAudit()).toMatchObject({
      who: 'The owner',
      action: 'invite',
      subjectId: invited.body.id,
    });
    const first = await tokenMailedTo(email);
    await owner.post(`${API}/users/${invited.body.id}/invitation`).expect(204);
    const token = await tokenMailedTo(email, 2);

    await house.anonymous().post(`${API}/password/set`).send({ token, password: PASSWORD }).expect(204);
    await house
      .anonymous()
      .post(`${API}/password/set`)
      .send({ token: first, password: PASSWORD })
      .expect(400);
    const session = await house.anonymous().post(`${API}/session`).send({ email, password: PASSWORD });
    expect(session.body).toMatchObject({ shop: { id: shop.id, role: 'technician' } });
    await owner.post(`${API}/users/${invited.body.id}/invitation`).expect(409);
    await owner.post(`${API}/users`).send({ email, displayName: 'Again', role: 'owner' }).expect(409);
  });

  it('who work in another shop are added with their own name and password', async () => {
    const other = await house.makeShop({ roles: ['owner', 'counter'] });
    const { email } = other.person('counter');
    const added = await owner
      .post(`${API}/users`)
      .send({ email, displayName: 'Renamed', role: 'accountant' });
    expect(added.body).toMatchObject({ displayName: 'The counter', hasPassword: true });
    await owner.patch(`${API}/users/${added.body.id}`).send({ displayName: 'Renamed' }).expect(409);
    const agent = await other.as('counter');
    const session = await agent.patch(`${API}/session`).send({ shopId: other.id });
    expect(session.body.shops).toHaveLength(2);

    // Switched off here, they still work there.
    await owner.patch(`${API}/users/${added.body.id}`).send({ isDisabled: true }).expect(200);
    await agent.get(`${API}/session`).expect(200);
    await (
      await other.as('owner')
    )
      .patch(`${API}/users/${added.body.id}`)
      .send({ role: 'owner' })
      .expect(404);
  });

  it('who are switched off are out at once, and back in only by signing in again', async () => {
    const agent = await shop.as('accountant');
    const { id } = await personOf(owner, shop.person('accountant').email);
    await owner.patch(`${API}/users/${id}`).send({ isDisabled: true }).expect(200);
    await agent.get(`${API}/session`).expect(401);
    await expect(shop.as('accountant')).rejects.toThrow('401');
    await owner.patch(`${API}/users/${id}`).send({ isDisabled: false }).expect(200);
    await agent.get(`${API}/session`).expect(401);
    await shop.as('accountant');
  });

  it('have a new role at their next request', async () => {
    const agent = await shop.as('counter');
    await agent.get(`${API}/families`).expect(403);
    const { id } = await personOf(owner, shop.person('counter').email);
    await owner.patch(`${API}/users/${id}`).send({ role: 'service_manager' }).expect(200);
    await agent.get(`${API}/families`).expect(200);
    await owner.patch(`${API}/users/${id}`).send({ role: 'counter', displayName: 'At the door' }).expect(200);
    expect(await lastAudit()).toMatchObject({ action: 'change', detail: { role: 'counter' } });
  });

  it('always leave one owner who can sign in, even when two step down at one moment', async () => {
    const two = await house.makeShop({ roles: ['owner', 'service_manager'] });
    const first = await two.as('owner');
    const self = await personOf(first, two.person('owner').email);
    const colleague = await personOf(first, two.person('service_manager').email);
    await first.patch(`${API}/users/${self.id}`).send({ role: 'counter' }).expect(409);
    await first.patch(`${API}/users/${self.id}`).send({ isDisabled: true }).expect(409);
    // An owner who has not chosen a password yet cannot run the shop.
    await first
      .post(`${API}/users`)
      .send({ email: `p.${two.id}@x.example`, displayName: 'P', role: 'owner' });
    await first.patch(`${API}/users/${self.id}`).send({ role: 'counter' }).expect(409);

    await first.patch(`${API}/users/${colleague.id}`).send({ role: 'owner' }).expect(200);
    const second = await two.as('service_manager');
    const answers = await Promise.all([
      first.patch(`${API}/users/${self.id}`).send({ role: 'counter' }),
      second.patch(`${API}/users/${colleague.id}`).send({ role: 'counter' }),
    ]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
  });
});

describe('keys', () => {
  it('are shown once, work at once, are noted when used, and end at once', async () => {
    const made = await owner.post(`${API}/keys`).send({ name: 'Shop software', scopes: ['read'] });
    expect(made.status).toBe(201);
    const { key, id } = made.body;
    const use = () => house.anonymous().get(`${API}/units`).set('Authorization', `Bearer ${key}`);
    await use().expect(200);
    const list = await owner.get(`${API}/keys`);
    expect(list.text).not.toContain(key);
    const listed = list.body.data.find((row: { id: string }) => row.id === id);
    expect(listed).toMatchObject({ hint: key.slice(-4), scopes: ['read'], isRevoked: false });
    expect(Date.parse(listed.lastUsedAt)).toBeGreaterThan(Date.parse(listed.createdAt) - 1000);
    await use().expect(200);
    expect((await owner.get(`${API}/keys`)).body).toEqual(list.body);

    const stranger = await (await house.makeShop({ roles: ['owner'] })).as('owner');
    await stranger.delete(`${API}/keys/${id}`).expect(404);
    await owner.delete(`${API}/keys/${id}`).expect(204);
    await use().expect(401);
    expect(await lastAudit()).toMatchObject({ action: 'revoke', subject: 'key', subjectId: id });
    await owner.post(`${API}/keys`).send({ name: 'x', scopes: [] }).expect(400);
  });
});

describe('shop settings', () => {
  it('are changed by field, and a new window asks for one new analysis', async () => {
    const before = (await owner.get(`${API}/shop`)).body;
    const changed = await owner
      .patch(`${API}/shop`)
      .send({ doorRateCents: 11_000, timeZone: 'America/Chicago' });
    expect(changed.body).toEqual({ ...before, doorRateCents: 11_000, timeZone: 'America/Chicago' });
    const runs = async () =>
      (await house.migrator.query('SELECT FROM analysis_runs WHERE shop_id = $1', [shop.id])).rowCount;
    expect(await runs()).toBe(0);
    await owner.patch(`${API}/shop`).send({ windowDays: 60 }).expect(200);
    expect(await runs()).toBe(1);
    expect((await owner.get(`${API}/session`)).body.shop.windowDays).toBe(60);
    expect(await lastAudit()).toMatchObject({ subject: 'shop', detail: { windowDays: 60 } });
  });

  it('take no zone, language or currency that cannot be computed with, and no other shop’s name', async () => {
    const wrong = await owner
      .patch(`${API}/shop`)
      .send({ timeZone: 'Mars/Base', locale: '??', currency: 'QQQ' });
    expect(wrong.status).toBe(400);
    expect(wrong.body.errors.map(({ path }: { path: string }) => path)).toEqual([
      '/timeZone',
      '/locale',
      '/currency',
    ]);
    const other = await house.makeShop({ roles: [] });
    await owner
      .patch(`${API}/shop`)
      .send({ name: `Shop ${other.id}` })
      .expect(409);
  });
});

describe('families', () => {
  it('are made, replaced and removed, with models of this shop alone', async () => {
    const modelOf = async (shopId: string, model: string) => {
      const { rows } = await house.migrator.query<{ id: string }>(
        `INSERT INTO models (shop_id, maker, maker_key, model, model_key) VALUES ($1, 'Alder', 'alder', $2, lower($2)) RETURNING id`,
        [shopId, model],
      );
      return rows[0]?.id ?? '';
    };
    const other = await house.makeShop({ roles: ['owner'] });
    const [a, b, theirs] = [
      await modelOf(shop.id, 'A1'),
      await modelOf(shop.id, 'B2'),
      await modelOf(other.id, 'C3'),
    ];
    const manager = await shop.as('service_manager');
    const refused = await manager.post(`${API}/families`).send({ name: 'Deck 42', modelIds: [a, theirs] });
    expect(refused.body.errors).toEqual([{ path: '/modelIds/1', message: 'There is no such model.' }]);
    const made = await manager.post(`${API}/families`).send({ name: 'Deck 42', modelIds: [b, a] });
    expect(made.body.models).toEqual([
      { id: a, name: 'Alder A1' },
      { id: b, name: 'Alder B2' },
    ]);
    await manager.post(`${API}/families`).send({ name: ' deck  42', modelIds: [] }).expect(409);
    const address = `${API}/families/${made.body.id}`;
    await (await other.as('owner')).delete(address).expect(404);
    const replaced = await manager.put(address).send({ name: 'Deck 48', modelIds: [b] });
    expect((await manager.get(`${API}/families`)).body).toEqual({ data: [replaced.body], nextCursor: null });
    await manager.delete(address).expect(204);
    expect((await manager.get(`${API}/families`)).body.data).toEqual([]);
    const waiting = await house.migrator.query('SELECT FROM analysis_runs WHERE shop_id = $1', [shop.id]);
    expect(waiting.rowCount).toBeGreaterThan(0);
  });
});

describe('the audit', () => {
  it('is read page by page without a gap or a repetition', async () => {
    const whole = (await owner.get(`${API}/audit?limit=1000`)).body.data.map(({ id }: { id: string }) => id);
    const paged: string[] = [];
    let cursor: string | null = '';
    while (cursor !== null) {
      const page: { body: { data: { id: string }[]; nextCursor: string | null } } = await owner.get(
        `${API}/audit?limit=3${cursor && `&cursor=${cursor}`}`,
      );
      paged.push(...page.body.data.map(({ id }) => id));
      cursor = page.body.nextCursor;
    }
    expect(whole.length).toBeGreaterThan(6);
    expect(paged).toEqual(whole);
    await owner.get(`${API}/audit?cursor=nonsense`).expect(400);
  });
});
