import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { wilsonInterval } from '../../analytics';
import { meanCumulativeList, meanTimeList, monthReview, rateList } from '../../shared/reports';
import { openHouse, type House, type TestShop } from './house';
import { recordRows, type RecordRows } from './record-rows';

let house: House;
const api = '/api/v1/reports';

beforeAll(async () => {
  house = await openHouse();
});
afterAll(() => house.close());

/** Repairs of a year: ten a month from January 2025, of which `returns` of each month came back. */
async function shopOfAYear(returns: readonly number[], technicians: readonly string[] = []) {
  const shop = await house.makeShop();
  const rows = recordRows(house.migrator, shop.id);
  const model = await rows.model('ZT-52');
  const clutch = await rows.component('PTO clutch');
  const ids: string[] = [];
  for (const name of technicians) {
    const isUser = name === 'own';
    ids.push(await rows.technician(name, isUser ? shop.person('technician').userId : null));
  }
  const backs: { id: string; month: number }[] = [];
  for (const [at, count] of returns.entries()) {
    const month = String(at + 1).padStart(2, '0');
    for (let day = 1; day <= 10; day++) {
      const unitId = await rows.unit(model);
      const technicianId = ids[day % Math.max(1, ids.length)];
      const common = { unitId, modelId: model, technicianIds: technicianId ? [technicianId] : [] };
      const first = await rows.repair({
        closedOn: `2025-${month}-${String(day).padStart(2, '0')}`,
        ...common,
        facts: { trouble: [clutch] },
      });
      if (day > count) continue;
      const back = await rows.repair({ closedOn: `2025-${month}-25`, unitId, laborHours: 1 });
      await rows.comeback(back.id, first.id, { component_id: clutch });
      backs.push({ id: back.id, month: at + 1 });
    }
  }
  return { shop, rows, model, clutch, backs, technicianIds: ids };
}

const rates = async (shop: TestShop, role: Parameters<TestShop['as']>[0], query: object) =>
  rateList.parse((await (await shop.as(role)).get(`${api}/comeback-rate`).query(query).expect(200)).body)
    .data;

describe('comeback rates', () => {
  let year: Awaited<ReturnType<typeof shopOfAYear>>;
  beforeAll(async () => {
    year = await shopOfAYear([1, 0, 2, 1, 0, 1, 2, 9]);
    const { rows, model, clutch } = year;
    const unitId = await rows.unit(model);
    // None of these could come back: left out by the analysis, or not looked at yet.
    for (const leftOut of ['maintenance_only', 'unidentified', 'not_a_repair'])
      await rows.repair({ closedOn: '2025-01-15', unitId, facts: { leftOut, trouble: [clutch] } });
    await rows.repair({ closedOn: '2025-01-16', unitId });
    await rows.analyzed('2025-12-31');
  });

  it('stand on the month of the first repair, with their limits', async () => {
    const data = await rates(year.shop, 'accountant', { from: '2025-01-01', to: '2025-08-31' });
    expect(data.map(({ month, count, size }) => [month, count, size])).toEqual(
      [1, 0, 2, 1, 0, 1, 2, 9].map((count, at) => [`2025-0${at + 1}`, count, 10]),
    );
    const { lower, upper } = wilsonInterval(2, 10);
    expect(data[2]).toMatchObject({ key: '2025-03', rate: 0.2, interval: { lower, upper }, limits: null });
    expect(data[7]?.limits?.upper).toBeLessThan(0.9);
    expect(data.every(({ maturing }) => !maturing)).toBe(true);
  });

  it('follow a decision at once, and count as ours only what a person confirmed', async () => {
    const agent = await year.shop.as('owner');
    const [unrelated, ours] = year.backs.filter(({ month }) => month === 3);
    const march = async () => (await rates(year.shop, 'owner', { from: '2025-03-01', to: '2025-03-31' }))[0];
    expect(await march()).toMatchObject({ count: 2, oursCount: 0, oursRate: 0 });
    await agent.patch(`/api/v1/comebacks/${unrelated?.id}`).send({ reason: 'unrelated' }).expect(200);
    await agent.patch(`/api/v1/comebacks/${ours?.id}`).send({ status: 'confirmed' }).expect(200);
    expect(await march()).toMatchObject({ count: 1, oursCount: 1, oursRate: 0.1 });
    await agent.patch(`/api/v1/comebacks/${unrelated?.id}`).send({ reason: null }).expect(200);
  });

  it('stand by model and component with their names, over the days asked for', async () => {
    const range = { from: '2025-08-01', to: '2025-08-05' };
    const [byModel] = await rates(year.shop, 'service_manager', { by: 'model', ...range });
    expect(byModel).toMatchObject({ key: year.model, label: 'Hollowell ZT-52', count: 5, size: 5 });
    const [byComponent] = await rates(year.shop, 'technician', { by: 'component' });
    expect(byComponent).toMatchObject({ key: year.clutch, label: 'PTO clutch', count: 16, size: 80 });
  });

  it('are refused to those who may not see them', async () => {
    await (await year.shop.as('counter')).get(`${api}/comeback-rate`).expect(403);
    const books = await year.shop.as('accountant');
    await books.get(`${api}/comeback-rate?by=technician`).expect(403);
    await books.get(`${api}/comeback-rate?by=weather`).expect(400);
    const ask = async (by: string) =>
      house
        .anonymous()
        .get(`${api}/comeback-rate?by=${by}`)
        .set('Authorization', await year.shop.key('read'));
    expect((await ask('month')).status).toBe(200);
    expect((await ask('technician')).status).toBe(403);
  });

  it('are empty before the first analysis, and in another shop', async () => {
    const other = await house.makeShop();
    expect(await rates(other, 'owner', {})).toEqual([]);
    const answer = await (await other.as('owner')).get(`${api}/month`).expect(200);
    expect(monthReview.parse(answer.body)).toMatchObject({
      analysis: 'none',
      month: null,
      rows: [],
      todos: [],
    });
  });

  it('review a month: its cost, drivers and what waits', async () => {
    const answer = await (await year.shop.as('owner')).get(`${api}/month?month=2025-08`).expect(200);
    const review = monthReview.parse(answer.body);
    expect(review).toMatchObject({
      windowDays: 90,
      asOf: '2025-12-31',
      analysis: 'ready',
      month: '2025-08',
      isSignal: true,
      signalSystem: { system: 'PTO drive', count: 9 },
      firstVisitCure: { cured: 1, of: 10 },
      // An hour each at the door rate.
      costCents: 9 * 9500,
      costOfComebacks: 9,
    });
    expect(review.drivers).toMatchObject([
      { component: { name: 'PTO clutch' }, model: { name: 'Hollowell ZT-52' }, size: 80, count: 16 },
    ]);
    expect(review.drivers[0]?.costCents).toBe(16 * 9500);
    expect(review.drivers[0]?.oftenWhy).toBe('cause missed');
    expect(review.todos.find(({ kind }) => kind === 'review_comebacks')?.count).toBe(15);
    const latest = monthReview.parse((await (await year.shop.as('owner')).get(`${api}/month`)).body);
    expect(latest.month).toBe('2025-09');
    await (await year.shop.as('owner')).get(`${api}/month?month=August`).expect(400);
    await (await year.shop.as('counter')).get(`${api}/month`).expect(403);
  });

  it('agree with the lists of models and components, which show the counter none', async () => {
    const seen = async (role: Parameters<TestShop['as']>[0]) => {
      const agent = await year.shop.as(role);
      const model = (await agent.get('/api/v1/models').expect(200)).body.data[0];
      const component = (await agent.get(`/api/v1/components/${year.clutch}`).expect(200)).body;
      return [model, component].map(({ comebackCount, comebackSize }) => [comebackCount, comebackSize]);
    };
    expect(await seen('owner')).toEqual([
      [16, 80],
      [16, 80],
    ]);
    expect(await seen('counter')).toEqual([
      [0, 0],
      [0, 0],
    ]);
  });
});

describe('rates by technician', () => {
  it('show a technician their own row alone', async () => {
    const { shop, rows, technicianIds } = await shopOfAYear([3, 0, 2], ['own', 'B', 'C', 'D']);
    await rows.analyzed('2025-12-31');
    expect(await rates(shop, 'owner', { by: 'technician' })).toHaveLength(4);
    expect(await rates(shop, 'technician', { by: 'technician' })).toMatchObject([
      { key: technicianIds[0], label: 'own' },
    ]);
    expect(await rates(shop, 'technician', { by: 'month' })).not.toEqual([]);
  });

  it('keep the shop’s average too from a technician among fewer than four', async () => {
    const { shop, rows, technicianIds } = await shopOfAYear([3, 0, 2], ['own', 'B', 'C']);
    await rows.analyzed('2025-12-31');
    const [own, ...others] = await rates(shop, 'technician', { by: 'technician' });
    expect(own).toMatchObject({ key: technicianIds[0], shrunken: null, projected: null });
    expect(others).toEqual([]);
    for (const by of ['month', 'model', 'component'])
      expect(await rates(shop, 'technician', { by })).toEqual([]);
    await (await shop.as('technician')).get(`${api}/month`).expect(403);
    expect((await (await shop.as('technician')).get('/api/v1/models')).body.data[0].comebackSize).toBe(0);
    expect(await rates(shop, 'owner', { by: 'month' })).not.toEqual([]);
  });
});

describe('repairs again and again', () => {
  async function fleet(rows: RecordRows, isRegistered: boolean) {
    const model = await rows.model();
    for (const days of [
      ['2024-03-01', '2024-09-01'],
      ['2024-05-01', '2024-11-15'],
      ['2024-02-01', '2024-07-01', '2024-12-01'],
    ]) {
      const unitId = await rows.unit(model, { in_service_on: '2024-01-01', is_registered: isRegistered });
      for (const closedOn of days) await rows.repair({ closedOn, unitId, modelId: model, facts: {} });
    }
    return model;
  }

  it('give a mean time and a curve where machines are watched, and only a curve where they came in', async () => {
    const shop = await house.makeShop();
    const rows = recordRows(house.migrator, shop.id);
    const watched = await fleet(rows, true);
    const cameIn = await fleet(rows, false);
    await rows.analyzed('2024-12-31');
    const agent = await shop.as('technician');
    const ask = async (path: string, modelId: string) =>
      (await agent.get(`${api}/${path}`).query({ modelId }).expect(200)).body;
    const [mean] = meanTimeList.parse(await ask('mtbf', watched)).data;
    expect(mean).toMatchObject({
      machines: 3,
      repairs: 7,
      amongThoseThatCameIn: false,
      trend: 'no_trend',
      reason: null,
    });
    // Three machines, each watched for the 365 days of 2024 after its first.
    expect(mean?.meanDaysBetween).toBeCloseTo((3 * 365) / 7, 9);
    const [curve] = meanCumulativeList.parse(await ask('mean-cumulative', watched)).data;
    expect(curve?.rows.at(-1)?.mean).toBeCloseTo(7 / 3, 9);
    expect(meanTimeList.parse(await ask('mtbf', cameIn)).data).toMatchObject([
      { meanDaysBetween: null, amongThoseThatCameIn: true, reason: 'came_in' },
    ]);
    await agent.get(`${api}/mtbf?modelId=17`).expect(400);
    await (await shop.as('counter')).get(`${api}/mtbf`).expect(403);
    const stranger = await (await house.makeShop({ roles: ['owner'] })).as('owner');
    expect((await stranger.get(`${api}/mtbf?modelId=${watched}`)).body.data).toEqual([]);
  });
});
