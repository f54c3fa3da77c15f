import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { RepairListed } from '../../shared/repairs';
import { repairList, repairWhole } from '../../shared/repairs';
import { openHouse, type House, type TestShop } from './house';
import { recordRows, type RecordRows } from './record-rows';

let house: House;
let shop: TestShop;
let rows: RecordRows;
const api = '/api/v1/repairs';

beforeAll(async () => {
  house = await openHouse();
  shop = await house.makeShop();
  rows = recordRows(house.migrator, shop.id);
});
afterAll(() => house.close());

async function list(query: Record<string, string>, as: TestShop = shop): Promise<RepairListed[]> {
  const answer = await (await as.as('owner')).get(api).query(query).expect(200);
  return repairList.parse(answer.body).data;
}
const numbers = async (query: Record<string, string>) => (await list(query)).map(({ number }) => number);

describe('the list of repairs', () => {
  it('pages to the end in a stable order, newest work first', async () => {
    const own = await house.makeShop();
    const theirs = recordRows(house.migrator, own.id);
    for (let at = 0; at < 7; at++) await theirs.repair({ closedOn: at < 4 ? '2026-03-02' : '2026-03-01' });
    const agent = await own.as('counter');
    const seen: RepairListed[] = [];
    let cursor: string | null = null;
    do {
      const answer = await agent.get(api).query({ limit: 3, ...(cursor ? { cursor } : {}) });
      const page = repairList.parse(answer.body);
      seen.push(...page.data);
      cursor = page.nextCursor;
    } while (cursor);
    expect(seen.map(({ workOn }) => workOn)).toEqual([...seen.map(({ workOn }) => workOn)].sort().reverse());
    expect(new Set(seen.map(({ id }) => id)).size).toBe(7);
    expect(seen).toEqual((await agent.get(api)).body.data);
  });

  it('says what was done, by whom, for how much, and whether it came back', async () => {
    const modelId = await rows.model('PT-46');
    const unitId = await rows.unit(modelId);
    const clutch = await rows.component('PTO clutch');
    const dk = await rows.technician('D. Kessler');
    const first = await rows.repair({
      closedOn: '2025-04-02',
      unitId,
      modelId,
      meterHours: 412.5,
      complaint: 'Blades will not engage',
      laborAmountCents: 9500,
      technicianIds: [dk],
      lines: [
        { componentId: clutch, reason: 'failed', amountCents: 21_000 },
        { componentId: clutch, reason: 'failed', amountCents: 500 },
        { kind: 'labor', laborAmountCents: 9500 },
      ],
    });
    const second = await rows.repair({ closedOn: '2025-05-02', unitId, modelId });
    await rows.comeback(second.id, first.id);
    const found = (await list({ unitId })).find(({ id }) => id === first.id);
    expect(found).toMatchObject({
      model: { id: modelId, name: 'Hollowell PT-46' },
      meterHours: 412.5,
      components: [{ id: clutch, name: 'PTO clutch' }],
      technicians: [{ id: dk, name: 'D. Kessler' }],
      totalCents: 31_000,
      cameBackAfterDays: 30,
      isComebackOf: null,
    });
    expect((await list({ unitId, cameBack: 'no' })).map(({ id }) => id)).toEqual([second.id]);
    expect((await list({ unitId, cameBack: 'yes' }))[0]?.id).toBe(first.id);
    expect((await list({ componentId: clutch, technicianId: dk, modelId })).length).toBe(1);
  });

  it('finds by machine, number, dates and words, and takes % and _ as they are', async () => {
    const modelId = await rows.model('ZX  54', 'Carrow');
    const unitId = await rows.unit(modelId, { serial: 'AB 77', serial_key: 'ab 77', maker_key: 'carrow' });
    const customerId = await rows.customer('Ida Marsh', '(555) 010-7788');
    const { number } = await rows.repair({
      closedOn: '2024-07-09',
      unitId,
      modelId,
      customerId,
      complaint: 'Runs at 100% choke',
    });
    expect(await numbers({ serial: ' ab  77' })).toEqual([number]);
    expect(await numbers({ number: number.toLowerCase() })).toEqual([number]);
    expect(await numbers({ maker: 'CARROW', model: 'zx 54' })).toEqual([number]);
    expect(await numbers({ from: '2024-07-09', to: '2024-07-09' })).toEqual([number]);
    expect(await numbers({ to: '2024-07-08' })).toEqual([]);
    expect(await numbers({ q: '100% CHOKE' })).toEqual([number]);
    expect(await numbers({ q: '100_ choke' })).toEqual([]);
    expect(await numbers({ q: 'ida mar' })).toEqual([number]);
    expect(await numbers({ q: '5550107788' })).toEqual([number]);
    expect(await numbers({ q: 'AB 77' })).toEqual([number]);
  });

  it('refuses what it does not know', async () => {
    const agent = await shop.as('owner');
    await agent.get(api).query({ colour: 'red' }).expect(400);
    await agent.get(api).query({ limit: 1001 }).expect(400);
    await agent.get(api).query({ cursor: 'bm90IG1pbmU' }).expect(400);
    await agent.get(api).query({ from: '2026-02-30' }).expect(400);
    await house.anonymous().get(api).expect(401);
    await house
      .anonymous()
      .get(api)
      .set('Authorization', await shop.key('import'))
      .expect(403);
  });
});

describe('one repair', () => {
  it('has its lines, both ways of its returns, and earlier versions', async () => {
    const component = await rows.component();
    const part = await rows.part(component, 'HW-100-A');
    const first = await rows.repair({ closedOn: '2025-01-10', complaint: 'No spark' });
    const middle = await rows.repair({
      closedOn: '2025-02-10',
      lines: [{ componentId: component, partId: part, reason: 'failed', amountCents: 100, costCents: 60 }],
    });
    const last = await rows.repair({ closedOn: '2025-03-10' });
    await rows.comeback(middle.id, first.id);
    await rows.comeback(last.id, middle.id, { days: 28 });
    await rows.insert('repair_versions', {
      shop_id: shop.id,
      repair_id: middle.id,
      version: 1,
      repair: '{}',
      lines: '[]',
    });
    const answer = await (await shop.as('technician')).get(`${api}/${middle.id}`).expect(200);
    const found = repairWhole.parse(answer.body);
    expect(found.lines).toMatchObject([
      { part: { id: part, name: 'HW-100-A' }, reason: 'failed', reasonOrigin: 'file', costCents: 60 },
    ]);
    expect(found.cameBackAs).toMatchObject([{ number: last.number, days: 28 }]);
    expect(found.isComebackOf).toMatchObject({ number: first.number, days: 30 });
    expect(found.versions).toHaveLength(1);
  });

  it('shows a program neither customer nor technician, and does not search by them', async () => {
    const customerId = await rows.customer('Otto Brandvold', '555-0199');
    const dk = await rows.technician('M. Ruiz');
    const { id } = await rows.repair({
      closedOn: '2023-01-10',
      customerId,
      technicianText: 'MR',
      technicianIds: [dk],
      lines: [{ kind: 'labor', technicianText: 'MR' }],
    });
    const person = repairWhole.parse((await (await shop.as('counter')).get(`${api}/${id}`)).body);
    expect(person).toMatchObject({ customer: { name: 'Otto Brandvold' }, technicianText: 'MR' });
    const key = await shop.key('read');
    const ask = (path: string) => house.anonymous().get(path).set('Authorization', key);
    const program = repairWhole.parse((await ask(`${api}/${id}`).expect(200)).body);
    expect(program).toMatchObject({ customer: null, technicianText: null, technicians: [] });
    expect(program.lines[0]?.technician).toBeNull();
    expect((await ask(`${api}?q=brandvold`)).body.data).toEqual([]);
    expect((await ask(`${api}?to=2023-02-01&from=2023-01-01`)).body.data[0].technicians).toEqual([]);
    await ask(`${api}?technicianId=${dk}`).expect(403);
  });

  it('gives a technician no rate of another in the disguise of a filter', async () => {
    const other = await rows.technician('J. Holt');
    const own = await rows.technician('The technician', shop.person('technician').userId);
    const agent = await shop.as('technician');
    await agent.get(api).query({ technicianId: other, cameBack: 'yes' }).expect(403);
    await agent.get(api).query({ technicianId: own, cameBack: 'yes' }).expect(200);
    await agent.get(api).query({ technicianId: other }).expect(200);
  });

  it('is not found in another shop, nor where there is none', async () => {
    const { id } = await rows.repair({ closedOn: '2025-01-10' });
    const other = await house.makeShop({ roles: ['owner'] });
    const stranger = await other.as('owner');
    await stranger.get(`${api}/${id}`).expect(404);
    await stranger.get(`${api}/00000000-0000-4000-8000-000000000000`).expect(404);
    await stranger.get(`${api}/17`).expect(400);
  });
});
