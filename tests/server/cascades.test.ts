import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { dayNumber } from '../../analytics/records/day-number';
import { findingList, findingSummary, findingWhole } from '../../shared/findings';
import { openHouse, type House, type TestShop } from './house';
import { recordRows, type RecordRows } from './record-rows';

let house: House;
let shop: TestShop;
let rows: RecordRows;
let modelId: string;
let otherModelId: string;
let unitId: string;
let clutch: string;
let fuse: string;
let findingId: string;
let first: { id: string; number: string };
let second: { id: string; number: string };
const api = '/api/v1/cascades';

const visit = (repair: { id: string }, on: string, hours: number | null, components: string[]) => ({
  day: dayNumber(on),
  hours,
  visitIds: [repair.id],
  components,
});

beforeAll(async () => {
  house = await openHouse();
  shop = await house.makeShop();
  rows = recordRows(house.migrator, shop.id);
  modelId = await rows.model('PT-46');
  otherModelId = await rows.model('PT-50');
  unitId = await rows.unit(modelId);
  clutch = await rows.component('PTO clutch');
  fuse = await rows.component('Main fuse');
  first = await rows.repair({
    closedOn: '2025-03-01',
    unitId,
    modelId,
    laborAmountCents: 4_000,
    lines: [{ componentId: fuse, reason: 'damage', amountCents: 600 }],
  });
  second = await rows.repair({
    closedOn: '2025-04-01',
    unitId,
    modelId,
    laborAmountCents: 9_500,
    lines: [{ componentId: clutch, reason: 'failed', amountCents: 21_000 }],
  });
  const cases = [
    {
      unitId,
      stance: 'for',
      course: 'resultantFirst',
      visits: [
        visit(first, '2025-03-01', 410, ['Main fuse']),
        visit(second, '2025-04-01', 422.5, ['PTO clutch']),
      ],
    },
    {
      unitId,
      stance: 'against',
      course: 'causalFirst',
      visits: [visit(second, '2025-04-01', null, ['PTO clutch'])],
    },
  ];
  const limits = { lower: 1.5, upper: null };
  const detail = {
    model: modelId,
    causal: 'PTO clutch',
    resultant: 'Main fuse',
    declared: true,
    evidence: 'replaced before',
    causalTotal: 8,
    resultantTotal: 12,
    resultantNearCausal: 9,
    resultantAlone: 3,
    episodes: 11,
    withBoth: 8,
    causalFirst: 1,
    resultantFirst: 6,
    endedByCausal: 6,
    endedByResultant: 1,
    soloReplacements: 9,
    soloReturns: 6,
    withCausalReplacements: 3,
    withCausalReturns: 0,
    returnRatio: null,
    returnRatioLimits: limits,
    expectedNear: 0.8,
    excessRatio: 10,
    excessRatioLimits: { lower: 4, upper: 21 },
    shareExplained: 0.75,
    medianDays: 31,
    medianHoursBetween: 12.5,
    borrowedFrom: [otherModelId],
    cases,
  };
  const pair = { causal_component_id: clutch, resultant_component_id: fuse };
  findingId = await rows.insertWithId('findings', {
    ...pair,
    model_id: modelId,
    kind: 'cascade',
    q_value: 0.01,
    detail: JSON.stringify(detail),
  });
  await rows.insertWithId('findings', {
    ...pair,
    model_id: otherModelId,
    kind: 'together',
    q_value: 0.04,
    detail: JSON.stringify({ ...detail, evidence: 'seen together', borrowedFrom: [], cases: [] }),
  });
  await rows.analyzed('2025-12-31', {
    examined: { models: 2, pairs: 31 },
    warnings: ['noUnits'],
    caseFiles: [
      { model: modelId, components: ['Main fuse', 'PTO clutch'], episodes: 1, cases: cases.slice(0, 1) },
    ],
  });
});
afterAll(() => house.close());

describe('what takes what with it', () => {
  it('lists every pair with the counts behind it', async () => {
    const answer = await (await shop.as('technician')).get(api).expect(200);
    const { data, nextCursor } = findingList.parse(answer.body);
    expect(nextCursor).toBeNull();
    expect(data.map(({ kind, model }) => [kind, model])).toEqual([
      ['cascade', 'PT-46'],
      ['together', 'PT-50'],
    ]);
    expect(data[0]).toMatchObject({
      id: findingId,
      maker: 'Hollowell',
      causal: 'PTO clutch',
      resultant: 'Main fuse',
      causalComponent: { id: clutch },
      evidence: 'replaced_before',
      leftIn: { returns: 6, of: 9 },
      replaced: { returns: 0, of: 3, interval: { lower: 0 } },
      returnRatio: null,
      returnRatioInterval: { lower: 1.5, upper: null },
      medianHours: 12.5,
      borrowedFrom: [{ id: otherModelId, name: 'Hollowell PT-50' }],
      // The fuse of the first visit, and all of the second.
      spentCents: 600 + 30_500,
    });
  });

  it('narrows to a maker and model', async () => {
    const agent = await shop.as('accountant');
    const count = async (query: object) => (await agent.get(api).query(query).expect(200)).body.data.length;
    expect(await count({ maker: 'hollowell' })).toBe(2);
    expect(await count({ model: 'pt-46' })).toBe(1);
    expect(await count({ modelId: otherModelId })).toBe(1);
    expect(await count({ maker: 'nobody' })).toBe(0);
  });

  it('shows the episodes of one, for and against', async () => {
    const answer = await (await shop.as('owner')).get(`${api}/${findingId}`).expect(200);
    const { cases } = findingWhole.parse(answer.body);
    expect(cases.map(({ speaks }) => speaks)).toEqual(['for', 'against']);
    expect(cases[0]?.why).toContain('Main fuse first');
    expect(cases[0]?.visits).toEqual([
      {
        repair: { id: first.id, name: first.number },
        on: '2025-03-01',
        hours: 410,
        daysIn: 0,
        hoursIn: 0,
        causal: false,
        resultant: true,
        spentCents: 4_600,
      },
      {
        repair: { id: second.id, name: second.number },
        on: '2025-04-01',
        hours: 422.5,
        daysIn: 31,
        hoursIn: 12.5,
        causal: true,
        resultant: false,
        spentCents: 30_500,
      },
    ]);
    expect(cases[1]?.visits[0]).toMatchObject({ hours: null, hoursIn: null });
  });

  it('says how much was examined, and keeps what was seen too seldom apart', async () => {
    const answer = await (await shop.as('service_manager')).get(`${api}/summary`).expect(200);
    expect(findingSummary.parse(answer.body)).toEqual({
      asOf: '2025-12-31',
      pairsExamined: 31,
      models: 2,
      warnings: ['noUnits'],
      caseFiles: [
        {
          model: { id: modelId, name: 'Hollowell PT-46' },
          first: { id: fuse, name: 'Main fuse' },
          second: { id: clutch, name: 'PTO clutch' },
          times: 1,
          repairs: expect.arrayContaining([{ id: first.id, name: first.number }]),
        },
      ],
    });
  });

  it('is part of the model and of the component’s life', async () => {
    const agent = await shop.as('technician');
    const { body: model } = await agent.get(`/api/v1/models/${modelId}`).expect(200);
    expect(model).toMatchObject({
      findings: 1,
      findingsHere: [{ id: findingId, kind: 'cascade', episodes: 11 }],
    });
    const { body: life } = await agent.get('/api/v1/part-life').query({ component: clutch }).expect(200);
    expect(life.takesWithIt).toMatchObject([
      { findingId, component: { id: fuse }, model: { id: modelId }, both: 8, episodes: 11 },
    ]);
  });

  it('is refused and not found as everything else', async () => {
    await (await shop.as('counter')).get(api).expect(403);
    await (await shop.as('counter')).get(`${api}/summary`).expect(403);
    const agent = await shop.as('owner');
    await agent.get(`${api}?limit=5`).expect(400);
    await agent.get(`${api}/${modelId}`).expect(404);
    await agent.get(`${api}/first`).expect(400);
    const stranger = await (await house.makeShop({ roles: ['owner'] })).as('owner');
    await stranger.get(`${api}/${findingId}`).expect(404);
    expect((await stranger.get(api)).body).toEqual({ data: [], nextCursor: null });
    expect((await stranger.get(`${api}/summary`)).body).toMatchObject({ asOf: null, pairsExamined: 0 });
    await house
      .anonymous()
      .get(api)
      .set('Authorization', await shop.key('import'))
      .expect(403);
  });
});
