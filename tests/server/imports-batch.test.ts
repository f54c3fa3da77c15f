import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { openHouse, type House, type TestShop } from './house';

let house: House;
let shop: TestShop;
let key: string;

beforeAll(async () => {
  house = await openHouse();
});
beforeEach(async () => {
  shop = await house.makeShop({ roles: ['technician'] });
  key = await shop.key('import');
});
afterAll(() => house.close());

const send = (repairs: unknown, idempotencyKey?: string) => {
  const request = house.anonymous().post('/api/v1/repairs/batch').set('Authorization', key);
  return (idempotencyKey ? request.set('Idempotency-Key', idempotencyKey) : request).send({
    repairs,
  } as object);
};
const repair = (repairNumber: string, more: object = {}) => ({
  repairNumber,
  closedOn: '2025-04-01',
  unit: { serial: 'S-1', maker: 'Hollowell', model: 'HX-42' },
  lines: [
    {
      partNumber: 'B-1',
      component: 'Belt',
      reason: 'failed',
      amountCents: 4250,
      laborAmountCents: 5000,
      laborHours: 0.5,
    },
  ],
  ...more,
});

describe('a batch of repairs', () => {
  it('takes in what is right and names what is wrong, each on its own', async () => {
    const answer = await send([
      repair('B-1'),
      repair('B-2', { closedOn: '2025-02-30', extra: 1 }),
      repair('B-3', { openedOn: '2025-05-01' }),
      repair('b-1'),
      7,
    ]).expect(200);
    expect(answer.body).toMatchObject({ created: 1, updated: 0, unchanged: 0, analysis: 'pending' });
    expect(
      answer.body.rejected.map(({ index, repairNumber }: { index: number; repairNumber: string }) => [
        index,
        repairNumber,
      ]),
    ).toEqual([
      [1, 'B-2'],
      [2, 'B-3'],
      [3, 'b-1'],
      [4, null],
    ]);
    expect(answer.body.rejected[0].errors.map(({ path }: { path: string }) => path)).toEqual([
      '/repairs/1/closedOn',
      '/repairs/1/extra',
    ]);
    expect(answer.body.rejected[1].errors[0].path).toBe('/repairs/2/closedOn');
    const state = await house
      .anonymous()
      .get(`/api/v1/imports/${answer.body.importId}`)
      .set('Authorization', key)
      .expect(200);
    expect(state.body).toMatchObject({
      source: 'batch',
      status: 'done',
      rowsRead: 5,
      created: 1,
      rejected: 4,
    });
    const { rows } = await house.migrator.query(
      `SELECT labor_amount_cents, labor_hours, complaint FROM repairs WHERE shop_id = $1`,
      [shop.id],
    );
    expect(rows).toEqual([{ labor_amount_cents: 5000, labor_hours: '0.50', complaint: null }]);
  });

  it('leaves absent fields, clears null ones, and says unchanged of the same', async () => {
    await send([repair('B-1', { complaint: 'No spark', notes: 'Keep' })]).expect(200);
    expect((await send([repair('B-1')])).body).toMatchObject({ unchanged: 1, updated: 0, analysis: 'ready' });
    const { lines: _lines, ...bare } = repair('B-1', { complaint: null });
    expect((await send([bare])).body).toMatchObject({ updated: 1 });
    const { rows } = await house.migrator.query(
      `SELECT complaint, notes, (SELECT count(*)::int FROM repair_lines l WHERE l.repair_id = r.id) AS lines FROM repairs r WHERE shop_id = $1`,
      [shop.id],
    );
    expect(rows).toEqual([{ complaint: null, notes: 'Keep', lines: 1 }]);
    const reopened = repair('B-1', { lines: [...repair('').lines, { partNumber: 'C-9', reason: 'failed' }] });
    expect((await send([reopened])).body).toMatchObject({ updated: 1, analysis: 'pending' });
  });

  it('answers the same key and content as before, and other content 422', async () => {
    const first = await send([repair('B-1')], 'key-1').expect(200);
    expect((await send([repair('B-1')], 'key-1').expect(200)).body).toEqual(first.body);
    await send([repair('B-2')], 'key-1').expect(422);
    await house.migrator.query(
      `INSERT INTO idempotency_keys (shop_id, key, fingerprint) SELECT shop_id, 'key-2', fingerprint FROM idempotency_keys WHERE shop_id = $1`,
      [shop.id],
    );
    await send([repair('B-1')], 'key-2').expect(409);
    const { rowCount } = await house.migrator.query('SELECT FROM imports WHERE shop_id = $1', [shop.id]);
    expect(rowCount).toBe(1);
  });

  it('is refused whole where it is too large, not well formed or not allowed', async () => {
    await send(Array.from({ length: 5001 }, () => 1)).expect(413);
    await send('none').expect(400);
    const technician = await shop.as('technician');
    await technician.post('/api/v1/repairs/batch').send({ repairs: [] }).expect(403);
    key = await shop.key('read');
    await send([]).expect(403);
    await house.anonymous().post('/api/v1/repairs/batch').send({ repairs: [] }).expect(401);
  });

  it('of two at once is one after the other', async () => {
    const both = await Promise.all([
      send([repair('B-1'), repair('B-2')]),
      send([repair('B-2'), repair('B-1')]),
    ]);
    const counts = both.map(({ body }) => [body.created, body.unchanged]).sort();
    expect(counts).toEqual([
      [0, 2],
      [2, 0],
    ]);
    const { rowCount } = await house.migrator.query('SELECT FROM units WHERE shop_id = $1', [shop.id]);
    expect(rowCount).toBe(1);
  });
});
