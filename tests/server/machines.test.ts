import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { unitList, unitWhole } from '../../shared/machines';
import { partList, partListed } from '../../shared/parts';
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

describe('machines', () => {
  it('are listed to the end in one order, with their repairs and last reading', async () => {
    const model = await rows.model('LT-9');
    const units: string[] = [];
    for (let at = 0; at < 5; at++)
      units.push(
        await rows.unit(model, {
          identity: 'tag',
          serial: null,
          serial_key: null,
          unit_ref: 'T',
          unit_ref_key: 't',
        }),
      );
    await rows.repair({ closedOn: '2025-03-01', unitId: units[0], meterHours: 100 });
    await rows.repair({ closedOn: '2025-05-01', unitId: units[0] });
    const agent = await shop.as('technician');
    const seen = await allPages(agent, `/api/v1/units?modelId=${model}`, 2);
    expect(seen.map(({ id }) => id).sort()).toEqual([...units].sort());
    const whole = unitList.parse((await agent.get(`/api/v1/units?model=lt-9&maker=hollowell`)).body);
    expect(whole.data).toEqual(seen);
    expect(whole.data.find(({ id }) => id === units[0])).toMatchObject({
      name: 'T',
      repairs: 2,
      lastRepairOn: '2025-05-01',
      lastMeterHours: 100,
      model: { name: 'Hollowell LT-9' },
    });
  });

  it('tell their timeline over a replaced meter, and what is fitted now', async () => {
    const model = await rows.model();
    const customerId = await rows.customer('Nell Aro', '555-0102');
    const unitId = await rows.unit(model, {
      customer_id: customerId,
      in_service_on: '2022-01-01',
      register_meter_hours: 640,
      register_read_on: '2025-06-01',
      is_registered: true,
    });
    const clutch = await rows.component('PTO clutch');
    const part = await rows.part(clutch, 'HW-77-B');
    const visit = (
      closedOn: string,
      meterHours: number,
      lines: Parameters<RecordRows['repair']>[0]['lines'] = [],
    ) => rows.repair({ closedOn, meterHours, unitId, modelId: model, lines });
    await visit('2022-06-01', 120, [{ componentId: clutch, reason: 'failed' }]);
    await visit('2023-06-01', 9999);
    const third = await visit('2024-06-01', 500, [
      { componentId: clutch, partId: part, reason: 'failed', amountCents: 5000 },
      { kind: 'work', componentId: clutch, workDone: 'adjusted' },
    ]);
    const answer = await (await shop.as('counter')).get(`/api/v1/units/${unitId}`).expect(200);
    const unit = unitWhole.parse(answer.body);
    expect(unit.events.map(({ kind, cumulativeHours }) => [kind, cumulativeHours])).toEqual([
      ['repair', 120],
      ['repair', null],
      ['repair', 500],
      ['register', 640],
    ]);
    expect(unit.events[1]).toMatchObject({ meterHours: 9999, meterFault: 'placeholder' });
    expect(unit.events[2]).toMatchObject({
      repair: { id: third.id, number: third.number },
      replaced: [{ component: { id: clutch }, reason: 'failed' }],
      workDone: [{ component: { id: clutch }, workDone: 'adjusted' }],
      totalCents: 5000,
    });
    expect(unit.fitted).toEqual([
      {
        component: { id: clutch, name: 'PTO clutch' },
        part: { id: part, name: 'HW-77-B' },
        on: '2024-06-01',
        hoursSince: 140,
      },
    ]);
    expect(unit.customer).toMatchObject({ name: 'Nell Aro' });
    const program = await house
      .anonymous()
      .get(`/api/v1/units/${unitId}`)
      .set('Authorization', await shop.key('read'));
    expect(unitWhole.parse(program.body).customer).toBeNull();
  });

  it('are refused and not found as everything else', async () => {
    const unitId = await rows.unit(null);
    const agent = await shop.as('owner');
    await agent.get('/api/v1/units?serial=x&wheels=4').expect(400);
    await agent.get(`/api/v1/units/${NOWHERE}`).expect(404);
    const stranger = await (await house.makeShop({ roles: ['owner'] })).as('owner');
    await stranger.get(`/api/v1/units/${unitId}`).expect(404);
    const importKey = await shop.key('import');
    await house.anonymous().get('/api/v1/units').set('Authorization', importKey).expect(403);
  });
});

describe('part numbers', () => {
  it('are listed to the end, with what they are, what supersedes them and when last fitted', async () => {
    const spindle = await rows.component('Spindle');
    const newer = await rows.part(spindle, 'SP-2');
    const older = await rows.part(spindle, 'SP-1', { superseded_by_part_id: newer, list_price_cents: 4_150 });
    await rows.part(spindle, 'SP-3');
    await rows.repair({ closedOn: '2025-05-05', lines: [{ componentId: spindle, partId: older }] });
    const agent = await shop.as('accountant');
    const seen = await allPages(agent, `/api/v1/parts?componentId=${spindle}`, 1);
    expect(partList.parse({ data: seen, nextCursor: null }).data).toMatchObject([
      { number: 'SP-1', supersededBy: { id: newer, name: 'SP-2' }, fitted: 1, lastFittedOn: '2025-05-05' },
      { number: 'SP-2', supersededBy: null, fitted: 0, lastFittedOn: null },
      { number: 'SP-3' },
    ]);
    const one = await agent.get(`/api/v1/parts/${older}`).expect(200);
    expect(partListed.parse(one.body)).toEqual(seen[0]);
    const found = await agent.get('/api/v1/parts').query({ number: 'sp-2', maker: 'HOLLOWELL' });
    expect(found.body.data).toHaveLength(1);
    expect((await agent.get('/api/v1/parts').query({ q: 'spindl' })).body.data).toHaveLength(3);
  });

  it('are refused and not found as everything else', async () => {
    const part = await rows.part(null);
    const agent = await shop.as('owner');
    await agent.get('/api/v1/parts?limit=0').expect(400);
    await agent.get(`/api/v1/parts/${NOWHERE}`).expect(404);
    const stranger = await (await house.makeShop({ roles: ['owner'] })).as('owner');
    await stranger.get(`/api/v1/parts/${part}`).expect(404);
    expect((await stranger.get('/api/v1/parts')).body.data).toEqual([]);
    const importKey = await shop.key('import');
    await house.anonymous().get('/api/v1/parts').set('Authorization', importKey).expect(403);
  });
});
