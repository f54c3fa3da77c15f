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

describe('a repair that changes', () => {
  const changed = (...rows: readonly string[][]) => csv(HEADER, ...rows);

  it('keeps its earlier state, the ids of lines that say the same, and a person’s word on them', async () => {
    await bringFile(manager, csv(HEADER, ...ROWS));
    const [before] = await repairsOf(shop.id);
    const spindle = before.lines[1].id;
    await house.migrator.query(
      `UPDATE repair_lines SET reason = 'damage', reason_origin = 'person' WHERE id = $1`,
      [spindle],
    );
    const [first = [], second = []] = ROWS;
    const dearer = second.map((cell) => (cell === '118.00' ? '125.00' : cell));
    const more = first.map((cell) => (cell === 'B-100' ? 'K-300' : cell === 'Deck belt' ? 'Key' : cell));
    const state = await bringFile(manager, changed(dearer, more, first));
    expect(state).toMatchObject({ status: 'done', created: 0, updated: 1, unchanged: 0, rejected: 0 });
    const [after] = await repairsOf(shop.id);
    expect(after.lines.map((line: { part_number_text: string }) => line.part_number_text)).toEqual([
      'S-200',
      'K-300',
      'B-100',
    ]);
    expect(after.lines[0]).toMatchObject({
      id: spindle,
      amount_cents: 12500,
      reason: 'damage',
      reason_origin: 'person',
    });
    expect(after.lines[2].id).toBe(before.lines[0].id);
    expect(after).toMatchObject({ version: 2, changed_by_import_id: state.id });
    const { rows } = await house.migrator.query(
      'SELECT version, repair, lines FROM repair_versions WHERE repair_id = $1',
      [after.id],
    );
    expect(rows).toHaveLength(1);
    expect(rows[0]).toMatchObject({ version: 1, repair: { id: after.id, labor_hours: 1.5 } });
    expect(rows[0].lines.map((line: { amount_cents: number }) => line.amount_cents)).toEqual([4250, 11800]);
  });

  it('leaves what the file has no column for, and clears what stands empty, but never a machine’s own', async () => {
    await bringFile(
      manager,
      csv([...HEADER, 'notes', 'in_service_on'], ...ROWS.map((row) => [...row, 'Keep me', '2024-04-01'])),
    );
    const state = await bringFile(
      manager,
      csv(['repair_number', 'closed_on', 'meter_hours', 'in_service_on'], ['1001', '2025-05-02', '', '']),
    );
    expect(state).toMatchObject({ updated: 1, created: 0 });
    const [repair] = await repairsOf(shop.id);
    expect(repair).toMatchObject({
      notes: 'Keep me',
      meter_hours: null,
      serial_text: 'A-1',
      technician_text: 'Dale / Rosa',
    });
    expect(repair.unit_id).not.toBeNull();
    expect(repair.lines).toHaveLength(2);
    const units = await house.migrator.query(
      `SELECT in_service_on::text AS day FROM units WHERE shop_id = $1`,
      [shop.id],
    );
    expect(units.rows).toEqual([{ day: '2024-04-01' }]);
  });
});

describe('rejected rows', () => {
  it('reject their whole repair, wherever its rows stand, and can be corrected and sent again', async () => {
    const bad = ROWS.map((row) => [...row]);
    const [first = [], second = [], third = []] = bad;
    second[12] = 'two';
    const file = csv(HEADER, first, third, second, [
      '1009',
      '2025-13-01',
      '=HYPERLINK("x")',
      '',
      '',
      '',
      '',
      '',
      '',
      '',
      '',
      '-5',
      '',
      '',
    ]);
    const state = await bringFile(manager, file);
    expect(state).toMatchObject({ status: 'done', rowsRead: 4, created: 1, rejected: 2 });
    const list = await manager.get(`/api/v1/imports/${state.id}/rejections`).expect(200);
    expect(
      list.body.data.map(({ line, repairNumber }: { line: number; repairNumber: string }) => [
        line,
        repairNumber,
      ]),
    ).toEqual([
      [2, '1001'],
      [4, '1001'],
      [5, '1009'],
    ]);
    expect(list.body.data[1].errors).toEqual([
      {
        column: 'labor_hours',
        value: 'two',
        message: 'is not a number with decimal point',
        mend: expect.stringContaining('1234.50'),
      },
    ]);
    expect(list.body.data[2].errors[0]).toMatchObject({ column: 'closed_on', value: '2025-13-01' });
    const answer = await manager.get(`/api/v1/imports/${state.id}/rejected.csv`).expect(200);
    expect(answer.headers['content-type']).toContain('text/csv');
    const lines = answer.text.split('\r\n');
    expect(lines[0]).toBe([...HEADER, 'import_line', 'import_errors', 'import_mend'].join(','));
    expect(answer.text).toContain(`"'=HYPERLINK(""x"")"`);
    expect(answer.text).toContain(',-5,');
    const corrected = answer.text.replace(',two,', ',2.0,').replace('2025-13-01', '2025-12-01');
    const again = await bringFile(manager, corrected);
    expect(again).toMatchObject({ status: 'done', created: 2, updated: 0, rejected: 0 });
    const models = await house.migrator.query(
      `SELECT maker_text FROM (SELECT maker AS maker_text FROM models WHERE shop_id = $1) m`,
      [shop.id],
    );
    // The first spelling that went in.
    expect(models.rows).toEqual([{ maker_text: 'hollowell' }]);
    expect((await repairsOf(shop.id)).map(({ number, labor_hours }) => [number, labor_hours])).toEqual([
      ['1001', '3.50'],
      ['1002', '0.50'],
      ['1009', null],
    ]);
  });

  it('name rows of a repair that disagree, near and far', async () => {
    const near = [
      ['1', '2025-01-02', 'M', '7'],
      ['1', '2025-01-03', 'M', ''],
    ];
    const far = [
      ['2', '2025-01-02', 'M', '1'],
      ['3', '2025-01-02', 'M', ''],
      ['2', '2025-01-02', 'Other', ''],
      ['3', '2025-01-02', '', '2'],
    ];
    const state = await bringFile(
      manager,
      csv(['repair_number', 'closed_on', 'model', 'labor_hours'], ...near, ...far),
    );
    expect(state).toMatchObject({ status: 'done', created: 1, rejected: 2, rowsRead: 6 });
    const list = await manager.get(`/api/v1/imports/${state.id}/rejections?limit=3`);
    expect(list.body.data.map(({ line }: { line: number }) => line)).toEqual([2, 3, 4]);
    const rest = await manager.get(
      `/api/v1/imports/${state.id}/rejections?limit=3&cursor=${list.body.nextCursor}`,
    );
    expect(
      rest.body.data.map(({ line, errors }: { line: number; errors: { column: string }[] }) => [
        line,
        errors[0]?.column,
      ]),
    ).toEqual([[6, 'model']]);
    const [repair] = await repairsOf(shop.id);
    expect(repair).toMatchObject({ number: '3', labor_hours: '2.00' });
  });
});

describe('undoing', () => {
  it('takes back what the import made and restores what it changed', async () => {
    await bringFile(manager, csv(HEADER, ...ROWS));
    const before = await repairsOf(shop.id);
    const [first = []] = ROWS;
    const state = await bringFile(
      manager,
      csv(
        HEADER,
        first.map((cell) => (cell === '42.50' ? '50' : cell)),
        ['2001', '2025-07-01', 'New', 'N-1', 'Z-9', '5', 'Uma', 'Q-1', 'Fuse', 'failed', '1', '3', '', ''],
      ),
    );
    expect(state).toMatchObject({ created: 1, updated: 1 });
    const undone = await manager.post(`/api/v1/imports/${state.id}/undo`).expect(200);
    expect(undone.body).toMatchObject({ status: 'undone' });
    const strip = (rows: { meter_fault: unknown }[]) => rows.map(({ meter_fault: _fault, ...row }) => row);
    expect(strip(await repairsOf(shop.id))).toEqual(strip(before));
    for (const [table, count] of [
      ['units', 1],
      ['models', 1],
      ['parts', 2],
      ['components', 2],
      ['technicians', 2],
      ['repair_versions', 0],
    ] as const) {
      const { rowCount } = await house.migrator.query(`SELECT FROM ${table} WHERE shop_id = $1`, [shop.id]);
      expect([table, rowCount]).toEqual([table, count]);
    }
    await manager.post(`/api/v1/imports/${state.id}/undo`).expect(409);
  });

  it('is refused, with the list, where something later rests on it', async () => {
    const first = await bringFile(manager, csv(HEADER, ...ROWS));
    await bringFile(
      manager,
      csv(
        HEADER,
        [
          '1002',
          '2025-06-10',
          'Hollowell',
          'HX-42',
          'A-1',
          '170',
          'Dale',
          'B-100',
          'Deck belt',
          'failed',
          '1',
          '42.50',
          '0.5',
          '47.50',
        ],
        ['3001', '2025-08-01', 'Hollowell', 'HX-42', 'A-1', '200', 'Dale', '', '', '', '', '', '', ''],
      ),
    );
    const refused = await manager.post(`/api/v1/imports/${first.id}/undo`).expect(409);
    expect(refused.body.errors.map(({ message }: { message: string }) => message)).toEqual([
      'Repair 1002 was changed later.',
    ]);
    expect(await repairsOf(shop.id)).toHaveLength(4);
  });
});

describe('who may import', () => {
  it('is decided by role, key and shop', async () => {
    const technician = await shop.as('technician');
    await sendFile(technician, csv(HEADER, ...ROWS)).expect(403);
    await house.anonymous().post('/api/v1/imports').expect(401);
    const state = await bringFile(manager, csv(HEADER, ...ROWS));
    const other = await house.makeShop({ roles: ['owner'] });
    const stranger = await other.as('owner');
    await stranger.get(`/api/v1/imports/${state.id}`).expect(404);
    await stranger.get(`/api/v1/imports/${state.id}/rejections`).expect(404);
    await stranger.get(`/api/v1/imports/${state.id}/rejected.csv`).expect(404);
    await stranger.post(`/api/v1/imports/${state.id}/undo`).expect(404);
    const key = await shop.key('import');
    const list = await house.anonymous().get('/api/v1/imports').set('Authorization', key).expect(200);
    expect(list.body.data.map(({ id }: { id: string }) => id)).toEqual([state.id]);
  });
});
