import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { comeback, comebackList, type Comeback } from '../../shared/comebacks';
import { openHouse, type House, type TestShop } from './house';
import { allPages } from './pages';
import { recordRows, type RecordRows } from './record-rows';

let house: House;
let shop: TestShop;
let rows: RecordRows;
const api = '/api/v1/comebacks';
const NOWHERE = '00000000-0000-4000-8000-000000000000';

beforeAll(async () => {
  house = await openHouse();
  shop = await house.makeShop();
  rows = recordRows(house.migrator, shop.id);
});
afterAll(() => house.close());

/** Visits of one machine, one on each day, oldest first. */
async function visits(days: readonly string[], first: Partial<Parameters<RecordRows['repair']>[0]> = {}) {
  const modelId = await rows.model();
  const unitId = await rows.unit(modelId);
  const made = [];
  for (const closedOn of days) {
    made.push(await rows.repair({ closedOn, unitId, modelId, ...(made.length === 0 ? first : {}) }));
  }
  const [a, b, c] = made;
  if (!a || !b) throw new Error('two visits at least');
  return { modelId, unitId, a, b, c: c ?? b };
}

async function list(query: Record<string, string>, as: Parameters<TestShop['as']>[0] = 'owner') {
  const answer = await (
    await shop.as(as)
  )
    .get(api)
    .query({ limit: 1000, ...query })
    .expect(200);
  return comebackList.parse(answer.body).data;
}

async function decide(id: string, body: object): Promise<Comeback> {
  const answer = await (await shop.as('service_manager')).patch(`${api}/${id}`).send(body);
  expect(answer.body, JSON.stringify(answer.body)).toHaveProperty('repairNumber');
  return comeback.parse(answer.body);
}

describe('the list of comebacks', () => {
  it('belongs to the work date and technicians of the first repair, and knows the head of the episode', async () => {
    const dk = await rows.technician('D. Kessler');
    const component = await rows.component();
    const { modelId, a, b, c } = await visits(['2025-01-10', '2025-02-01', '2025-03-01'], {
      technicianIds: [dk],
    });
    await rows.comeback(b.id, a.id, { days: 22, component_id: component });
    await rows.comeback(c.id, b.id, { days: 28, episode_repair_id: a.id });
    const found = await list({ modelId });
    expect(found.map(({ repairNumber }) => repairNumber)).toEqual([c.number, b.number]);
    expect(found[1]).toMatchObject({
      firstRepairNumber: a.number,
      firstWorkOn: '2025-01-10',
      returnedOn: '2025-02-01',
      technicians: [{ name: 'D. Kessler' }],
      component: { id: component },
      days: 22,
      suggestedReason: 'cause_missed',
      reason: null,
      status: 'suggested',
      isOurs: false,
    });
    expect(found[0]).toMatchObject({ firstRepairNumber: b.number, episodeRepairNumber: a.number });
    expect(await list({ modelId, from: '2025-02-01', to: '2025-02-01' })).toMatchObject([{ id: c.id }]);
    expect(await list({ modelId, to: '2025-01-09' })).toEqual([]);
    expect(await list({ modelId, componentId: component })).toMatchObject([{ id: b.id }]);
    expect(await list({ technicianId: dk })).toMatchObject([{ id: b.id }]);
    expect(await list({ modelId, status: 'confirmed' })).toEqual([]);
  });

  it('pages to the end in one order', async () => {
    const own = await house.makeShop({ roles: ['accountant'] });
    const theirs = recordRows(house.migrator, own.id);
    const first = await theirs.repair({ closedOn: '2025-01-01', unitId: await theirs.unit(null) });
    for (let at = 0; at < 5; at++) {
      const back = await theirs.repair({ closedOn: `2025-02-0${at + 1}` });
      await theirs.comeback(back.id, first.id);
    }
    const agent = await own.as('accountant');
    const seen = await allPages(agent, api, 2);
    expect(new Set(seen.map(({ id }) => id)).size).toBe(5);
    expect(seen).toEqual((await agent.get(api)).body.data);
  });

  it('puts a price on what was given away, each return once', async () => {
    const { modelId, a, b, c } = await visits(['2025-01-10', '2025-02-01', '2025-03-01']);
    await rows.comeback(b.id, a.id);
    await rows.comeback(c.id, b.id);
    await house.migrator.query('UPDATE repairs SET labor_hours = 1.25 WHERE id = $1', [b.id]);
    await house.migrator.query(
      `UPDATE repairs SET pay_type = 'warranty', labor_hours = 3, labor_amount_cents = 0 WHERE id = $1`,
      [c.id],
    );
    const part = (amount_cents: number, cost_cents: number, pay_type: string | null, repair_id: string) =>
      rows.insertWithId('repair_lines', {
        repair_id,
        position: 0,
        kind: 'part',
        amount_cents,
        cost_cents,
        pay_type,
      });
    await part(0, 2_000, null, b.id);
    await part(9_900, 6_000, null, b.id);
    await part(9_900, 700, 'shop', b.id);
    await part(0, 5_000, null, c.id);
    const cost = new Map((await list({ modelId })).map(({ id, costCents }) => [id, costCents]));
    // 1.25 h at the door rate of $95.00, and the two parts that nobody paid for.
    expect(cost.get(b.id)).toBe(11_875 + 2_000 + 700);
    expect(cost.get(c.id)).toBe(0);
  });

  it('shows a technician their own and nobody else’s', async () => {
    const own = await rows.technician('The technician', shop.person('technician').userId);
    const other = await rows.technician('Somebody else');
    const mine = await visits(['2024-01-10', '2024-02-01'], { technicianIds: [own] });
    const theirs = await visits(['2024-01-10', '2024-02-01'], { technicianIds: [other] });
    await rows.comeback(mine.b.id, mine.a.id);
    await rows.comeback(theirs.b.id, theirs.a.id);
    const seen = await list({}, 'technician');
    expect(seen.map(({ id }) => id)).toEqual([mine.b.id]);
    const agent = await shop.as('technician');
    await agent.get(api).query({ technicianId: other }).expect(403);
    await agent.get(api).query({ technicianId: own }).expect(200);
    await agent.patch(`${api}/${mine.b.id}`).send({ status: 'dismissed' }).expect(403);
  });

  it('is not for the counter, and names no technician to a program', async () => {
    const dk = await rows.technician('J. Holt');
    const { modelId, a, b } = await visits(['2024-05-10', '2024-06-01'], { technicianIds: [dk] });
    await rows.comeback(b.id, a.id);
    await (await shop.as('counter')).get(api).expect(403);
    const key = await shop.key('read');
    const ask = (query: object) => house.anonymous().get(api).query(query).set('Authorization', key);
    expect(comebackList.parse((await ask({ modelId })).body).data).toMatchObject([
      { id: b.id, technicians: [] },
    ]);
    await ask({ technicianId: dk }).expect(403);
    await ask({ status: 'maybe' }).expect(400);
    await house
      .anonymous()
      .patch(`${api}/${b.id}`)
      .send({ status: 'dismissed' })
      .set('Authorization', key)
      .expect(403);
  });
});

describe('a person’s word', () => {
  it('holds at once, keeps what it does not name, and is on record', async () => {
    const { modelId, a, b } = await visits(['2025-01-10', '2025-02-01']);
    await rows.comeback(b.id, a.id, { suggested_reason: 'part_failed_again' });
    expect(await decide(b.id, { status: 'confirmed', note: 'Coil was cold.' })).toMatchObject({
      status: 'confirmed',
      isOurs: false,
      decidedBy: 'The service_manager',
    });
    expect(await decide(b.id, { isOurs: true })).toMatchObject({ isOurs: true, note: 'Coil was cold.' });
    expect(await decide(b.id, { reason: 'operator_or_fuel' })).toMatchObject({ isOurs: false });
    expect(await decide(b.id, { reason: 'workmanship' })).toMatchObject({ isOurs: true });
    expect(await list({ modelId })).toMatchObject([
      { reason: 'workmanship', suggestedReason: 'part_failed_again', status: 'confirmed' },
    ]);
    const { rows: log } = await house.migrator.query(
      `SELECT user_id, detail FROM audit_log WHERE subject_id = $1 ORDER BY created_at DESC LIMIT 1`,
      [b.id],
    );
    expect(log[0]).toMatchObject({
      user_id: shop.person('service_manager').userId,
      detail: { before: { reason: 'operator_or_fuel' }, after: { reason: 'workmanship' } },
    });
  });

  it('takes a dismissed return out of the repair’s own page too', async () => {
    const { a, b } = await visits(['2025-01-10', '2025-02-01']);
    await rows.comeback(b.id, a.id);
    const agent = await shop.as('owner');
    const cameBack = async () => (await agent.get(`/api/v1/repairs/${a.id}`)).body.cameBackAs;
    expect(await cameBack()).toHaveLength(1);
    await decide(b.id, { reason: 'unrelated' });
    expect(await cameBack()).toEqual([]);
    await decide(b.id, { reason: null });
    expect(await cameBack()).toHaveLength(1);
    await decide(b.id, { status: 'dismissed' });
    expect(await cameBack()).toEqual([]);
  });

  it('attaches to another repair of the machine, and asks for a new analysis', async () => {
    const own = await house.makeShop({ roles: ['service_manager'] });
    const theirs = recordRows(house.migrator, own.id);
    const unitId = await theirs.unit(await theirs.model());
    const visit = (closedOn: string) => theirs.repair({ closedOn, unitId });
    const [a, b, c] = [await visit('2025-01-10'), await visit('2025-02-01'), await visit('2025-02-15')];
    await theirs.comeback(c.id, b.id, { days: 14 });
    const agent = await own.as('service_manager');
    const attach = async (id: string, body: object) =>
      comeback.parse((await agent.patch(`${api}/${id}`).send(body).expect(200)).body);
    const { rows: before } = await house.migrator.query('SELECT id FROM analysis_runs WHERE shop_id = $1', [
      own.id,
    ]);
    expect(before).toEqual([]);
    expect(await attach(c.id, { attachedToRepairId: a.id })).toMatchObject({
      firstRepairNumber: a.number,
      episodeRepairNumber: a.number,
      days: 36,
      link: 'person',
    });
    const { rows: after } = await house.migrator.query('SELECT id FROM analysis_runs WHERE shop_id = $1', [
      own.id,
    ]);
    expect(after).toHaveLength(1);
    // A person can also name a return that no computation found.
    expect(await attach(b.id, { attachedToRepairId: a.id, status: 'confirmed' })).toMatchObject({
      firstRepairNumber: a.number,
      days: 22,
    });
  });

  it('is refused where it cannot be', async () => {
    const { a, b, c } = await visits(['2025-01-10', '2025-02-01', '2025-02-15']);
    const other = await visits(['2025-01-10', '2025-01-11']);
    await rows.comeback(b.id, a.id);
    const agent = await shop.as('owner');
    const refused = async (id: string, body: object, status: number) => {
      const answer = await agent.patch(`${api}/${id}`).send(body);
      expect(answer.status, JSON.stringify(answer.body)).toBe(status);
      return answer.body;
    };
    await refused(b.id, {}, 400);
    await refused(b.id, { status: 'perhaps' }, 400);
    await refused(b.id, { verdict: 'ours' }, 400);
    expect(await refused(b.id, { attachedToRepairId: NOWHERE }, 400)).toMatchObject({
      errors: [{ path: '/attachedToRepairId' }],
    });
    for (const id of [b.id, c.id, other.a.id]) await refused(b.id, { attachedToRepairId: id }, 400);
    await refused(a.id, { status: 'confirmed' }, 404);
    await refused(NOWHERE, { status: 'confirmed' }, 404);
    const stranger = await (await house.makeShop({ roles: ['owner'] })).as('owner');
    await stranger.patch(`${api}/${b.id}`).send({ status: 'confirmed' }).expect(404);
    await (await shop.as('accountant')).patch(`${api}/${b.id}`).send({ status: 'confirmed' }).expect(403);
  });
});
