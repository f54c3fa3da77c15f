import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openHouse, type House, type TestShop } from './house';

let house: House;
let shop: TestShop;
let key: string;

beforeAll(async () => {
  house = await openHouse();
  shop = await house.makeShop({ roles: ['owner'] });
  key = await shop.key('import', 'read');
});
afterAll(() => house.close());

const get = (path: string) => house.anonymous().get(`/api/v1${path}`).set('Authorization', key);
const post = (path: string) => house.anonymous().post(`/api/v1${path}`).set('Authorization', key);
const cursorOf = (...sortKey: unknown[]) => Buffer.from(JSON.stringify(sortKey)).toString('base64url');
const ID = '00000000-0000-4000-8000-000000000000';

describe('what the database cannot hold', () => {
  it.each([
    '/repairs?q=%00',
    '/repairs?serial=%00',
    '/repairs?from=0000-01-01',
    `/repairs?cursor=${cursorOf('0000-01-01', ID)}`,
    '/units?q=%00',
    '/models?q=%00',
    '/parts?q=%00',
    '/components?q=%00',
    `/components?cursor=${cursorOf('\0')}`,
    '/cascades?maker=%00',
    '/comebacks?from=0000-01-01',
    `/imports?cursor=${cursorOf('soon', ID)}`,
    `/imports?cursor=${cursorOf('9999999-01-01', ID)}`,
  ])('is the asker’s mistake: %s', async (path) => {
    const answer = await get(path).expect(400);
    expect(answer.type).toBe('application/problem+json');
  });

  it('is refused of a name, too', async () => {
    const owner = await shop.as('owner');
    await owner.patch('/api/v1/shop').send({ name: 'a\0b' }).expect(400);
    await house
      .anonymous()
      .post('/api/v1/session')
      .send({ email: 'a@b.example', password: '\0' })
      .expect(401);
  });
});

describe('bodies that are not what they should be', () => {
  it('are not taken for empty ones', async () => {
    const owner = await shop.as('owner');
    await owner.patch('/api/v1/shop').type('text/plain').send('{"windowDays":30}').expect(415);
    await owner.patch('/api/v1/shop').type('form').send('windowDays=30').expect(415);
    await owner.patch('/api/v1/shop').expect(200);
  });

  it('may be forms that are cut off', async () => {
    const form = '--b\r\nContent-Disposition: form-data; name="file"; filename="a"\r\n\r\nabc';
    await post('/imports').set('Content-Type', 'multipart/form-data; boundary=b').send(form).expect(400);
    await post('/imports').set('Content-Type', 'multipart/form-data').send(form).expect(400);
  });

  it('may be nested far beyond any repair', async () => {
    const deep = `{"repairs":[${'['.repeat(100_000)}${']'.repeat(100_000)}]}`;
    await post('/repairs/batch').type('json').send(deep).expect(400);
    await post('/repairs/batch').set('Idempotency-Key', 'deep').type('json').send(deep).expect(400);
  });
});

describe('amounts that add up beyond four bytes', () => {
  it('are listed and shown like any other', async () => {
    const most = 2_000_000_000;
    const line = { kind: 'part', partNumber: 'P-1', component: 'Engine', reason: 'failed' };
    const lines = [1, 2].map(() => ({ ...line, amountCents: most, costCents: most, laborAmountCents: most }));
    const unit = { serial: 'S-1', maker: 'Hollowell', model: 'HX-42' };
    const repairs = [{ repairNumber: 'R-1', closedOn: '2025-04-01', unit, lines: lines.slice(0, 1) }];
    await post('/repairs/batch').send({ repairs }).expect(200);
    const more = { repairNumber: 'R-2', closedOn: '2025-05-01', unit, laborAmountCents: 0 };
    const free = lines.map((one) => ({ ...one, payType: 'shop', laborAmountCents: 0 }));
    await post('/repairs/batch')
      .send({ repairs: [{ ...more, lines: free }] })
      .expect(200);

    const { data } = (await get('/repairs').expect(200)).body;
    expect(data.map(({ totalCents }: { totalCents: number }) => totalCents)).toEqual([2 * most, 2 * most]);
    const whole = (await get(`/repairs/${data[0].id}`).expect(200)).body;
    expect(whole).toMatchObject({ partsAmountCents: 2 * most, totalCents: 2 * most });
    const timeline = (await get(`/units/${data[0].unit.id}`).expect(200)).body;
    expect(JSON.stringify(timeline)).toContain(`"totalCents":${2 * most}`);
    await house.migrator.query(
      `INSERT INTO comebacks (shop_id, return_repair_id, first_repair_id, episode_repair_id, link, days, suggested_reason, evidence)
       VALUES ($1, $2, $3, $3, 'complaint', 30, 'undetermined', '') ON CONFLICT DO NOTHING`,
      [shop.id, data[0].id, data[1].id],
    );
    const comebacks = (await get('/comebacks').expect(200)).body;
    expect(comebacks.data[0].costCents).toBe(2 * most);
  });
});
