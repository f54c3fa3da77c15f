import type { Agent } from 'supertest';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { openHouse, type House, type TestShop } from './house';
import { bringFile, csv, sendFile } from './import-agent';

let house: House;
let shop: TestShop;
let manager: Agent;

beforeAll(async () => {
  house = await openHouse();
});
beforeEach(async () => {
  shop = await house.makeShop({ roles: ['service_manager', 'technician'] });
  manager = await shop.as('service_manager');
});
afterAll(() => house.close());

const HEADER = [
  'repair_number',
  'closed_on',
  'maker',
  'model',
  'unit_serial',
  'meter_hours',
  'technician',
  'part_number',
  'component',
  'line_reason',
  'quantity',
  'part_amount',
  'labor_hours',
  'labor_amount',
];
const ROWS = [
  [
    '1001',
    '2025-05-02',
    'Hollowell',
    'HX-42',
    'A-1',
    '120.5',
    'Dale / Rosa',
    'B-100',
    'Deck belt',
    'failed',
    '1',
    '42.50',
    '1.5',
    '142.50',
  ],
  [
    '1001',
    '2025-05-02',
    'Hollowell',
    'HX-42',
    'A-1',
    '120.5',
    'Dale / Rosa',
    'S-200',
    'Spindle',
    '',
    '2',
    '118.00',
    '',
    '',
  ],
  [
    '1002',
    '2025-06-10',
    'hollowell',
    'hx-42',
    'a-1',
    '160',
    'Dale',
    'B-100',
    'deck belt',
    'failed',
    '1',
    '42.50',
    '0.5',
    '47.50',
  ],
  ['1003', '2025-06-11', 'Hollowell', 'HX-42', '', '', 'Rosa', '', '', '', '', '', '1', '95'],
];

const repairsOf = async (shopId: string) =>
  (
    await house.migrator.query(
      `SELECT r.*, (SELECT json_agg(l ORDER BY l.position) FROM repair_lines l WHERE l.repair_id = r.id) AS lines
       FROM repairs r WHERE r.shop_id = $1 ORDER BY r.number`,
      [shopId],
    )
  ).rows;

describe('a native file of repairs', () => {
  it('goes in whole, and the same file again changes nothing', async () => {
    const first = await bringFile(manager, csv(HEADER, ...ROWS));
    expect(first).toMatchObject({
      status: 'done',
      rowsRead: 4,
      rowsTotal: 4,
      created: 3,
      updated: 0,
      unchanged: 0,
      rejected: 0,
      error: null,
    });
    const before = await repairsOf(shop.id);
    expect(
      before.map(({ number, labor_hours, labor_amount_cents }) => [number, labor_hours, labor_amount_cents]),
    ).toEqual([
      ['1001', '1.50', 14250],
      ['1002', '0.50', 4750],
      ['1003', '1.00', 9500],
    ]);
    expect(
      before[0].lines.map(
        (line: {
          part_number_text: string;
          reason: string;
          component_origin: string;
          amount_cents: number;
        }) => [line.part_number_text, line.reason, line.component_origin, line.amount_cents],
      ),
    ).toEqual([
      ['B-100', 'failed', 'file', 4250],
      ['S-200', 'unknown', 'file', 11800],
    ]);
    expect(before[0].unit_id).toBe(before[1].unit_id);
    expect(before[2].unit_id).toBeNull();
    const names = await house.migrator.query(
      'SELECT display_name FROM technicians WHERE shop_id = $1 ORDER BY 1',
      [shop.id],
    );
    expect(names.rows.map(({ display_name }) => display_name)).toEqual(['Dale', 'Rosa']);
    expect(first.remarks.map(({ kind, count }) => [kind, count])).toEqual([
      ['machine_not_identified', 1],
      ['reason_unknown', 1],
      ['new_technicians', 2],
    ]);

    const second = await bringFile(manager, csv(HEADER, ...ROWS));
    expect(second).toMatchObject({
      status: 'done',
      created: 0,
      updated: 0,
      unchanged: 3,
      rejected: 0,
      analysis: 'ready',
    });
    expect(await repairsOf(shop.id)).toEqual(before);
    const versions = await house.migrator.query('SELECT FROM repair_versions WHERE shop_id = $1', [shop.id]);
    expect(versions.rowCount).toBe(0);
  });
});
