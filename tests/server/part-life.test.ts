import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { fitWeibull, kaplanMeier } from '../../analytics';
import { partLife, type PartLife } from '../../shared/parts';
import { openHouse, type House, type TestShop } from './house';
import { recordRows, type RecordRows } from './record-rows';

let house: House;
let shop: TestShop;
let rows: RecordRows;
let modelId: string;
let clutch: string;
let older: string;
let newer: string;
const api = '/api/v1/part-life';
const FAILED = [120, 180, 210, 260, 300, 340];
const RUNNING = [150, 400, 420, 500];

async function life(of: Record<string, unknown> & { exit_hours: number | null }) {
  await rows.insertWithId('part_lives', {
    unit_id: await rows.unit(modelId, { is_registered: true }),
    model_id: modelId,
    component_id: clutch,
    origin: 'fitted',
    start_on: '2024-01-01',
    end_on: '2025-01-01',
    outcome: 'failed',
    entry_hours: of.exit_hours === null ? null : 0,
    entry_days: 0,
    exit_days: 366,
    ...of,
  });
}

beforeAll(async () => {
  house = await openHouse();
  shop = await house.makeShop();
  rows = recordRows(house.migrator, shop.id);
  modelId = await rows.model('PT-46');
  clutch = await rows.component('PTO clutch');
  newer = await rows.part(clutch, 'CL-200');
  older = await rows.part(clutch, 'CL-100', {
    superseded_by_part_id: newer,
    fitment_note: 'Needs the long key.',
  });
  for (const exit_hours of FAILED) await life({ exit_hours, part_id: older });
  for (const exit_hours of RUNNING) await life({ exit_hours, part_id: older, outcome: 'censored' });
  await life({ exit_hours: 700, part_id: newer, start_on: '2024-06-01' });
  for (const exit_hours of [800, 900])
    await life({ exit_hours, part_id: newer, outcome: 'censored', start_on: '2024-07-01' });
  await life({ exit_hours: 250, outcome: 'unknown' });
  await life({ exit_hours: 90, outcome: 'damage' });
  await life({ exit_hours: null });
  await life({ exit_hours: 600, entry_hours: 400, origin: 'assumed_original' });
  await rows.analyzed('2025-06-30');
});
afterAll(() => house.close());

async function read(query: Record<string, string>, role: Parameters<TestShop['as']>[0] = 'technician') {
  const answer = await (await shop.as(role)).get(api).query(query).expect(200);
  return partLife.parse(answer.body);
}

describe('the life of a part', () => {
  it('counts every life once, and gives the curve and fit of those that can be used', async () => {
    const found = await read({ component: 'pto  CLUTCH' });
    expect(found).toMatchObject({
      component: { id: clutch, name: 'PTO clutch' },
      scope: { model: null, family: null },
      clock: 'hours',
      clockReason: 'hours_known',
      lives: 14,
      failures: 7,
      unknown: 1,
      damaged: 1,
      withHours: 15,
      setAside: 1,
      assumedOriginal: 1,
      amongThoseThatCameIn: false,
      pattern: 'cannot_tell',
      asOf: '2025-06-30',
    });
    const observations = [
      ...[...FAILED, 700].map((time) => ({ time, failed: true })),
      ...[...RUNNING, 800, 900, 90].map((time) => ({ time, failed: false })),
    ];
    expect(found.kaplanMeier).toEqual(kaplanMeier(observations));
    const fit = fitWeibull(observations, { limits: 'profile' });
    if (fit.kind === 'notEstimable' || found.weibull.kind === 'notEstimable') throw new Error('no fit');
    expect(found.weibull.shape).toBeCloseTo(fit.shape, 9);
    expect(found.weibull.limits).toBe('profile');
    expect(found.weibull.bLives.map(({ percent }) => percent)).toEqual([10, 50]);
    const [first] = found.atRiskAt;
    expect(first).toEqual({ time: 0, atRisk: 14 });
    expect(found.atRiskAt.find(({ time }) => time === 400)?.atRisk).toBe(6);
  });

  it('keeps old and new numbers apart, and compares them', async () => {
    const { numbers, comparison } = await read({ component: clutch });
    expect(numbers).toMatchObject([
      { part: { id: newer, name: 'CL-200' }, lives: 3, failures: 1, firstFittedOn: '2024-06-01' },
      {
        part: { name: 'CL-100' },
        lives: 10,
        failures: 6,
        supersededBy: { id: newer },
        fitmentNote: 'Needs the long key.',
      },
    ]);
    expect(comparison).toMatchObject({ older: { id: older }, newer: { id: newer } });
    expect(comparison?.ratio).toBeLessThan(1);
    const one = await read({ component: clutch, partNumbers: ' cl-100' });
    expect(one).toMatchObject({ lives: 10, failures: 6 });
    expect((await read({ component: clutch, partNumbers: 'CL-100,CL-200' })).lives).toBe(13);
  });

  it('turns the switches that it is asked to', async () => {
    const failures = async (query: Record<string, string>): Promise<PartLife> =>
      read({ component: clutch, ...query });
    expect(await failures({ reasons: 'allFailed' })).toMatchObject({ lives: 15, failures: 8, unknown: 1 });
    expect(await failures({ reasons: 'noneFailed' })).toMatchObject({ lives: 15, failures: 7 });
    expect(await failures({ assumedOriginal: 'true' })).toMatchObject({ lives: 15, failures: 8 });
    expect(await failures({ clock: 'days' })).toMatchObject({
      clock: 'days',
      clockReason: 'asked',
      lives: 15,
    });
  });

  it('narrows to a model or a family', async () => {
    const other = await rows.model('PT-50');
    const familyId = await rows.insertWithId('families', { name: 'Deck 46', name_key: 'deck 46' });
    await rows.insert('family_models', { shop_id: shop.id, family_id: familyId, model_id: modelId });
    const here = await read({ component: clutch, maker: 'HOLLOWELL', model: 'pt-46' });
    expect(here).toMatchObject({ lives: 14, scope: { model: { id: modelId, name: 'Hollowell PT-46' } } });
    expect(await read({ component: clutch, familyId })).toMatchObject({
      lives: 14,
      scope: { family: { name: 'Deck 46' } },
    });
    expect(await read({ component: clutch, modelId: other })).toMatchObject({
      lives: 0,
      failures: 0,
      pattern: 'too_few',
      kaplanMeier: [],
      atRiskAt: [],
      weibull: { kind: 'notEstimable', reason: 'noFailures' },
    });
  });

  it('says too few where one age of failure is all there is, and labels broken machines as such', async () => {
    const rare = await rows.component('Hour meter');
    const unit = await rows.unit(modelId);
    await life({ exit_hours: 50, component_id: rare, unit_id: unit });
    await life({ exit_hours: 80, component_id: rare, unit_id: unit, outcome: 'censored' });
    expect(await read({ component: rare })).toMatchObject({
      failures: 1,
      pattern: 'too_few',
      amongThoseThatCameIn: true,
    });
  });

  it('is thinned where it is long, every row exact', async () => {
    const belt = await rows.component('Blade belt');
    const unit = await rows.unit(modelId);
    await house.migrator.query(
      `INSERT INTO part_lives (shop_id, unit_id, model_id, component_id, origin, end_on, outcome, entry_hours, exit_hours)
       SELECT $1, $2, $3, $4, 'fitted', '2025-01-01', 'failed', 0, 100 + n FROM generate_series(1, 900) n`,
      [shop.id, unit, modelId, belt],
    );
    const { kaplanMeier: curve, weibull, pattern } = await read({ component: belt });
    const whole = kaplanMeier(Array.from({ length: 900 }, (_, at) => ({ time: 101 + at, failed: true })));
    expect(curve).toHaveLength(400);
    expect(curve[0]).toEqual(whole[0]);
    expect(curve.at(-1)).toEqual(whole.at(-1));
    for (const row of curve) expect(whole.find(({ time }) => time === row.time)).toEqual(row);
    expect(weibull).toMatchObject({ kind: 'estimate', limits: 'wald' });
    expect(pattern).toBe('wears_out');
  });

  it('is refused and not found as everything else', async () => {
    const agent = await shop.as('owner');
    await agent.get(api).expect(400);
    await agent.get(api).query({ component: clutch, clock: 'moons' }).expect(400);
    const unknown = await agent.get(api).query({ component: clutch, partNumbers: 'CL-999' });
    expect([unknown.status, unknown.body.errors[0].path]).toEqual([400, '/partNumbers']);
    await agent.get(api).query({ component: 'Flux capacitor' }).expect(404);
    await agent.get(api).query({ component: clutch, model: 'none' }).expect(404);
    await agent.get(api).query({ component: clutch, familyId: clutch }).expect(404);
    await (await shop.as('counter')).get(api).query({ component: clutch }).expect(403);
    const stranger = await (await house.makeShop({ roles: ['owner'] })).as('owner');
    await stranger.get(api).query({ component: clutch }).expect(404);
    await stranger.get(api).query({ component: 'PTO clutch' }).expect(404);
    const key = await shop.key('read');
    await house.anonymous().get(api).query({ component: clutch }).set('Authorization', key).expect(200);
  });
});
