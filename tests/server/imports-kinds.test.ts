import type { Agent } from 'supertest';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { filePreview } from '../../shared/imports';
import { openHouse, type House, type TestShop } from './house';
import { bringFile, csv, overOf } from './import-agent';

let house: House;
let shop: TestShop;
let manager: Agent;

beforeAll(async () => {
  house = await openHouse();
});
beforeEach(async () => {
  shop = await house.makeShop({ roles: ['service_manager'] });
  manager = await shop.as('service_manager');
});
afterAll(() => house.close());

const rowsOf = async (text: string) => (await house.migrator.query(text, [shop.id])).rows;

describe('a file of another program', () => {
  const file = csv(
    [
      'RO #',
      'Date Closed',
      'Make',
      'Model',
      'Serial Number',
      'Hrs',
      'Part No',
      'Description',
      'Qty',
      'Shelf',
    ],
    ['77', '05/13/2025', 'Hollowell', 'HX-42', 'A-1', '120', 'B-1', 'Belt', '1', '4'],
    ['78', '05/02/2025', 'Hollowell', 'HX-42', 'A-1', '125', 'B-1', 'Belt', '1', '4'],
  );
  const look = (content: string) =>
    manager
      .post('/api/v1/imports/preview')
      .field('kind', 'repairs')
      .attach('file', Buffer.from(content), 'export.csv');

  it('is looked at, mapped by a person, and known the next time', async () => {
    const seen = filePreview.parse((await look(file).expect(200)).body);
    expect(seen).toMatchObject({
      format: 'csv',
      encoding: 'utf-8',
      delimiter: ',',
      decimal: '.',
      dateFormat: 'M/d/yyyy',
      isRemembered: false,
      problems: [],
    });
    expect(seen.dateFormatReason).toContain('05/13/2025');
    expect(seen.proposals.map(({ column }) => column)).toEqual([
      'repair_number',
      'closed_on',
      'maker',
      'model',
      'unit_serial',
      'meter_hours',
      'part_number',
      'part_description',
      'quantity',
      null,
    ]);
    const columns = Object.fromEntries(
      seen.proposals.flatMap(({ column, header }) => (column ? [[column, header]] : [])),
    );
    const mapping = { columns, dateFormat: 'M/d/yyyy' };
    const started = await manager
      .post('/api/v1/imports')
      .field('mapping', JSON.stringify(mapping))
      .field('spoolId', seen.spoolId)
      .field('kind', 'repairs')
      .expect(202);
    expect(started.headers['location']).toBe(`/api/v1/imports/${started.body.id}`);
    const state = await overOf(manager, started.body.id);
    expect(state).toMatchObject({
      status: 'done',
      created: 2,
      rejected: 0,
      fileName: 'export.csv',
      startedBy: 'The service_manager',
    });
    expect(state.remarks[0]).toEqual({
      kind: 'headers_not_used',
      text: 'columns that nothing is read from: Shelf',
      count: 1,
    });
    expect(
      await rowsOf(`SELECT closed_on::text AS day FROM repairs WHERE shop_id = $1 ORDER BY number`),
    ).toEqual([{ day: '2025-05-13' }, { day: '2025-05-02' }]);
    expect((await look(file)).body).toMatchObject({ isRemembered: true });
    expect(await bringFile(manager, file)).toMatchObject({ unchanged: 2, created: 0, rejected: 0 });
  });

  it('with days that can be read two ways is asked about, never guessed', async () => {
    const seen = filePreview.parse((await look(file.replace('05/13/2025', '05/12/2025'))).body);
    expect(seen.dateFormat).toBeNull();
    expect(seen.problems).toEqual([expect.stringContaining('M/d/yyyy or as d/M/yyyy')]);
  });

  it('of another shop cannot be fetched by its spool id', async () => {
    const seen = filePreview.parse((await look(file)).body);
    const other = await (await house.makeShop({ roles: ['owner'] })).as('owner');
    await other.post('/api/v1/imports').field('kind', 'repairs').field('spoolId', seen.spoolId).expect(404);
  });
});

it('a dry run says what would happen, and nothing does', async () => {
  const file = csv(
    ['repair_number', 'closed_on', 'technician'],
    ['1', '2025-01-01', 'Dale'],
    ['2', 'soon', 'Dale'],
  );
  const state = await bringFile(manager, file, { dryRun: true });
  expect(state).toMatchObject({ status: 'done', isDryRun: true, created: 1, rejected: 1, analysis: 'ready' });
  expect((await manager.get(`/api/v1/imports/${state.id}/rejections`)).body.data).toHaveLength(1);
  for (const table of ['repairs', 'technicians', 'import_changes', 'analysis_runs']) {
    expect(await rowsOf(`SELECT shop_id FROM ${table} WHERE shop_id = $1`)).toEqual([]);
  }
  await manager.post(`/api/v1/imports/${state.id}/undo`).expect(409);
});

describe('the register', () => {
  const header = [
    'unit_serial',
    'unit_ref',
    'maker',
    'model',
    'in_service_on',
    'meter_hours',
    'meter_read_on',
  ];

  it('says since when machines are known, and meets those of the repairs', async () => {
    await bringFile(
      manager,
      csv(
        ['repair_number', 'closed_on', 'unit_serial', 'maker', 'model'],
        ['1', '2025-03-01', 'A-1', 'Hollowell', 'HX-42'],
      ),
    );
    const register = csv(
      header,
      ['a-1', '', 'HOLLOWELL', 'HX-42', '2024-05-01', '310.5', '2025-06-01'],
      ['', 'T-7', 'Trask', 'T-1', '2023-01-01', '', ''],
      ['', '', 'Trask', 'T-1', '', '', ''],
    );
    const state = await bringFile(manager, register, { kind: 'units' });
    expect(state).toMatchObject({ status: 'done', created: 1, updated: 1, unchanged: 0, rejected: 1 });
    const units = `SELECT serial, unit_ref, identity, is_registered, known_from_on::text AS known, register_meter_hours AS hours FROM units WHERE shop_id = $1 ORDER BY serial`;
    expect(await rowsOf(units)).toEqual([
      {
        serial: 'A-1',
        unit_ref: null,
        identity: 'serial',
        is_registered: true,
        known: '2024-05-01',
        hours: '310.50',
      },
      {
        serial: null,
        unit_ref: 'T-7',
        identity: 'tag',
        is_registered: true,
        known: '2023-01-01',
        hours: null,
      },
    ]);
    expect(await bringFile(manager, register, { kind: 'units' })).toMatchObject({
      created: 0,
      updated: 0,
      unchanged: 2,
      rejected: 1,
    });
    await manager.post(`/api/v1/imports/${state.id}/undo`).expect(200);
    expect(await rowsOf(units)).toEqual([
      { serial: 'A-1', unit_ref: null, identity: 'serial', is_registered: false, known: null, hours: null },
    ]);
  });
});

describe('the catalogue of parts', () => {
  it('tells lines what their parts are, for as long as it says so', async () => {
    await bringFile(
      manager,
      csv(
        ['repair_number', 'closed_on', 'maker', 'model', 'part_number'],
        ['1', '2025-03-01', 'Hollowell', 'HX-42', 'B-1'],
      ),
    );
    const catalogue = csv(
      ['part_number', 'maker', 'component', 'system', 'superseded_by', 'list_price'],
      ['b-1', 'hollowell', 'Deck belt', 'Deck', 'B-2', '42.50'],
    );
    const state = await bringFile(manager, catalogue, { kind: 'parts' });
    expect(state).toMatchObject({ status: 'done', created: 0, updated: 1, rejected: 0 });
    const lines = `SELECT c.name, c.system, l.component_origin FROM repair_lines l LEFT JOIN components c ON c.id = l.component_id WHERE l.shop_id = $1`;
    expect(await rowsOf(lines)).toEqual([
      { name: 'Deck belt', system: 'Deck', component_origin: 'catalogue' },
    ]);
    expect(
      await rowsOf(
        `SELECT p.number, n.number AS next, p.list_price_cents FROM parts p LEFT JOIN parts n ON n.id = p.superseded_by_part_id WHERE p.shop_id = $1 ORDER BY 1`,
      ),
    ).toEqual([
      { number: 'B-1', next: 'B-2', list_price_cents: 4250 },
      { number: 'B-2', next: null, list_price_cents: null },
    ]);
    expect(await bringFile(manager, catalogue, { kind: 'parts' })).toMatchObject({
      updated: 0,
      unchanged: 1,
    });
    await manager.post(`/api/v1/imports/${state.id}/undo`).expect(200);
    expect(await rowsOf(lines)).toEqual([{ name: null, system: null, component_origin: 'unknown' }]);
  });
});
