import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { modelList, modelWhole } from '../../shared/machines';
import { componentList, componentListed } from '../../shared/parts';
import { openHouse, type House, type TestShop } from './house';
import { allPages } from './pages';
import { recordRows, type RecordRows } from './record-rows';

let house: House;
let shop: TestShop;
let rows: RecordRows;
const NOWHERE = '00000000-0000-4000-8000-000000000000';

beforeAll(async () => {
  house = await openHouse();
  shop = await house.makeShop();
  rows = recordRows(house.migrator, shop.id);
});
afterAll(() => house.close());

/** A model with two machines: one lost a clutch and a belt, the other a clutch. */
async function model(name: string) {
  const modelId = await rows.model(name);
  const clutch = await rows.component(`Clutch of ${name}`);
  const belt = await rows.component(`Belt of ${name}`, { system: 'cutting deck' });
  const [one, other] = [await rows.unit(modelId), await rows.unit(modelId)];
  await rows.repair({
    closedOn: '2025-04-01',
    unitId: one,
    modelId,
    meterHours: 100,
    lines: [
      { componentId: clutch, reason: 'failed', amountCents: 20_000 },
      { componentId: belt, reason: 'maintenance', amountCents: 3_000 },
      { componentId: belt },
    ],
  });
  await rows.repair({
    closedOn: '2025-05-01',
    unitId: other,
    modelId,
    meterHours: 300,
    lines: [{ componentId: clutch, reason: 'failed', amountCents: 22_000 }],
  });
  return { modelId, clutch, belt };
}

describe('models', () => {
  it('are listed to the end with what was counted on each', async () => {
    const own = await house.makeShop();
    const theirs = recordRows(house.migrator, own.id);
    for (const name of ['B-2', 'A-1', 'C-3']) await theirs.model(name);
    const agent = await own.as('technician');
    const seen = modelList.parse({ data: await allPages(agent, '/api/v1/models', 2), nextCursor: null }).data;
    expect(seen.map((row) => row.model)).toEqual(['A-1', 'B-2', 'C-3']);
    expect((await agent.get('/api/v1/models')).body.data).toEqual(seen);
    expect(seen[0]).toMatchObject({ units: 0, failures: 0, topComponent: null, comebackRate: null });
    expect((await agent.get('/api/v1/models').query({ q: 'well c' })).body.data).toHaveLength(1);
    expect(
      (await agent.get('/api/v1/models').query({ maker: 'hollowell', model: 'a-1' })).body.data,
    ).toHaveLength(1);
  });

  it('tell what fails on them', async () => {
    const { modelId, clutch, belt } = await model('LX-1');
    const answer = await (await shop.as('counter')).get(`/api/v1/models/${modelId}`).expect(200);
    const found = modelWhole.parse(answer.body);
    expect(found).toMatchObject({
      maker: 'Hollowell',
      model: 'LX-1',
      units: 2,
      repairs: 2,
      failures: 2,
      topComponent: { id: clutch },
      recurrence: { kind: 'notEstimable', reason: 'noMachines' },
      findingsHere: [],
    });
    expect(found.components).toMatchObject([
      { component: { id: clutch }, failures: 2, machines: 2, medianHours: 200, pattern: 'too_few' },
      { component: { id: belt }, failures: 0, maintenance: 1, unknown: 1, machines: 1, medianHours: null },
    ]);
  });

  it('are refused and not found as everything else', async () => {
    const modelId = await rows.model();
    const agent = await shop.as('owner');
    await agent.get('/api/v1/models?limit=many').expect(400);
    await agent.get(`/api/v1/models/${NOWHERE}`).expect(404);
    const stranger = await (await house.makeShop({ roles: ['owner'] })).as('owner');
    await stranger.get(`/api/v1/models/${modelId}`).expect(404);
    const importKey = await shop.key('import');
    await house.anonymous().get('/api/v1/models').set('Authorization', importKey).expect(403);
  });
});

describe('components', () => {
  it('are listed to the end, in all or on one model', async () => {
    const { modelId, clutch, belt } = await model('LX-2');
    const agent = await shop.as('technician');
    const here = componentList.parse((await agent.get('/api/v1/components').query({ modelId })).body).data;
    expect(here).toMatchObject([
      { id: belt, fitted: 2, failures: 0, unknown: 1, machines: 1, spentCents: 3_000 },
      { id: clutch, fitted: 2, failures: 2, unknown: 0, machines: 2, models: 1, spentCents: 42_000 },
    ]);
    expect(await allPages(agent, `/api/v1/components?modelId=${modelId}`, 1)).toEqual(here);
    expect(componentListed.parse((await agent.get(`/api/v1/components/${clutch}`)).body)).toEqual(here[1]);
    const found = await agent.get('/api/v1/components').query({ q: 'of lx-2' });
    expect(found.body.data).toHaveLength(2);
  });

  it('give the lines that state no reason theirs, take it back, and leave the others alone', async () => {
    const own = await house.makeShop();
    const theirs = recordRows(house.migrator, own.id);
    const fuse = await theirs.component('Main fuse');
    const line = (reason?: string, reasonOrigin?: string) => ({
      componentId: fuse,
      ...(reason ? { reason } : {}),
      ...(reasonOrigin ? { reasonOrigin } : {}),
    });
    const { id } = await theirs.repair({
      closedOn: '2025-04-01',
      lines: [
        line(),
        line('maintenance', 'file'),
        line('damage', 'person'),
        { ...line(), kind: 'work' },
        { ...line(), amountCents: -500 },
      ],
    });
    const agent = await own.as('service_manager');
    const reasons = async () =>
      (await agent.get(`/api/v1/repairs/${id}`)).body.lines.map(
        (row: { reason: string; reasonOrigin: string }) => `${row.reason} ${row.reasonOrigin}`,
      );
    const stated = ['maintenance file', 'damage person', 'unknown unknown', 'unknown unknown'];
    const decided = await agent
      .patch(`/api/v1/components/${fuse}`)
      .send({ kind: 'only_when_bad' })
      .expect(200);
    expect(componentListed.parse(decided.body)).toMatchObject({ kind: 'only_when_bad', failures: 1 });
    expect(await reasons()).toEqual(['failed rule', ...stated]);
    await agent.patch(`/api/v1/components/${fuse}`).send({ kind: 'service_item' }).expect(200);
    expect(await reasons()).toEqual(['maintenance rule', ...stated]);
    await agent.patch(`/api/v1/components/${fuse}`).send({ kind: 'depends' }).expect(200);
    expect(await reasons()).toEqual(['unknown unknown', ...stated]);
    const { rows: log } = await house.migrator.query(
      `SELECT detail FROM audit_log WHERE subject_id = $1 ORDER BY created_at`,
      [fuse],
    );
    expect(log.map(({ detail }) => [detail.after.kind, detail.lines])).toEqual([
      ['only_when_bad', 1],
      ['service_item', 1],
      ['depends', 1],
    ]);
    const { rows: runs } = await house.migrator.query('SELECT 1 FROM analysis_runs WHERE shop_id = $1', [
      own.id,
    ]);
    expect(runs.length).toBeGreaterThan(0);
  });

  it('get a name and a system, and keep them', async () => {
    const own = await house.makeShop();
    const theirs = recordRows(house.migrator, own.id);
    const id = await theirs.component('Pto sw');
    await theirs.component('Main fuse');
    const agent = await own.as('owner');
    const change = (body: object) => agent.patch(`/api/v1/components/${id}`).send(body);
    await change({ name: ' PTO switch ', system: 'safety circuit' }).expect(200);
    expect((await agent.get(`/api/v1/components/${id}`)).body).toMatchObject({
      name: 'PTO switch',
      system: 'safety circuit',
    });
    expect((await change({ name: 'MAIN  fuse' })).status).toBe(409);
    await change({}).expect(400);
    await change({ name: '' }).expect(400);
    await change({ colour: 'red' }).expect(400);
    await agent.patch(`/api/v1/components/${NOWHERE}`).send({ kind: 'depends' }).expect(404);
    await (
      await own.as('technician')
    )
      .patch(`/api/v1/components/${id}`)
      .send({ kind: 'depends' })
      .expect(403);
    await (await shop.as('owner')).patch(`/api/v1/components/${id}`).send({ kind: 'depends' }).expect(404);
    await (await shop.as('owner')).get(`/api/v1/components/${id}`).expect(404);
  });
});
