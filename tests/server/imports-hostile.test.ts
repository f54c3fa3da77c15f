import ExcelJS from 'exceljs';
import type { Agent } from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { deflateRawSync } from 'node:zlib';
import { openHouse, type House, type TestShop } from './house';
import { bringFile, csv, sendFile } from './import-agent';

let house: House;
let shop: TestShop;
let manager: Agent;
let serial = 0;
/** A repair number that no other test of this file uses. */
const next = () => `H-${(serial += 1)}`;

beforeAll(async () => {
  house = await openHouse();
  shop = await house.makeShop({ roles: ['service_manager'] });
  manager = await shop.as('service_manager');
});
afterAll(() => house.close());

const detailOf = async (content: string | Buffer, fileName = 'file.csv') => {
  const answer = await sendFile(manager, content, { fileName }).expect(400);
  return JSON.stringify(answer.body);
};
const readRepair = async (number: string) => {
  const { rows } = await house.migrator.query(
    `SELECT number, closed_on::text AS closed_on, complaint, meter_hours, labor_amount_cents FROM repairs WHERE shop_id = $1 AND number = $2`,
    [shop.id, number],
  );
  return rows[0];
};
const firstErrors = async (id: string) =>
  (await manager.get(`/api/v1/imports/${id}/rejections`)).body.data.map(
    (row: { errors: unknown[] }) => row.errors[0],
  );

describe('files that are no records', () => {
  it('are refused with what they are', async () => {
    expect(await detailOf('')).toContain('empty');
    expect(await detailOf(Buffer.from([0xd0, 0xcf, 0x11, 0xe0, 1, 2, 3, 4]))).toContain('.xls');
    expect(await detailOf('%PDF-1.7 etc')).toContain('PDF');
    expect(await detailOf(Buffer.from(Array.from({ length: 2000 }, (_, at) => (at * 37) % 32)))).toContain(
      'neither CSV nor XLSX',
    );
    expect(await detailOf(Buffer.from('PK\u0003\u0004 not a zip at all'), 'x.xlsx')).toContain('damaged');
    expect(await detailOf('\r\n\r\n')).toContain('header row');
  });

  it('lack columns by name, or have two of one name', async () => {
    const lacking = await sendFile(manager, csv(['RO #', 'Date'], ['1', '2025-01-01'])).expect(400);
    expect(lacking.body.errors.map(({ path }: { path: string }) => path)).toEqual([
      '/mapping/columns/repair_number',
      '/mapping/columns/closed_on',
    ]);
    expect(
      await detailOf(csv(['repair_number', 'closed_on', 'Closed-On'], ['1', '2025-01-01', '2025-01-02'])),
    ).toContain('two columns');
    await sendFile(manager, csv(['repair_number', 'closed_on']), { kind: 'terms' }).expect(400);
    await sendFile(manager, csv(['repair_number', 'closed_on']), {
      mapping: { columns: { closed_on: 'Nowhere' } },
    }).expect(400);
    await manager.post('/api/v1/imports').field('kind', 'repairs').expect(400);
  });

  it('with a header alone bring nothing', async () => {
    expect(await bringFile(manager, csv(['repair_number', 'closed_on']))).toMatchObject({
      status: 'done',
      rowsRead: 0,
      created: 0,
      analysis: 'ready',
    });
  });
});

describe('texts and numbers', () => {
  it('are read in their encoding, delimiter and decimal', async () => {
    const [ansi, wide, comma, point] = [next(), next(), next(), next()];
    await bringFile(
      manager,
      Buffer.from(
        `repair_number,closed_on,complaint\r\n${ansi},2025-01-01,d\xe9marrage \x96 dur\r\n`,
        'latin1',
      ),
    );
    expect(await readRepair(ansi)).toMatchObject({ complaint: 'démarrage – dur' });
    await bringFile(
      manager,
      Buffer.from(`\ufeffrepair_number\tclosed_on\tcomplaint\r\n${wide}\t2025-01-01\tžába\r\n`, 'utf16le'),
    );
    expect(await readRepair(wide)).toMatchObject({ complaint: 'žába' });
    await bringFile(
      manager,
      `repair_number;closed_on;meter_hours;labor_amount\n${comma};2025-01-01;1.234,5;95,505\n`,
    );
    expect(await readRepair(comma)).toMatchObject({ meter_hours: '1234.50', labor_amount_cents: 9551 });
    await bringFile(
      manager,
      `repair_number;closed_on;meter_hours;labor_amount\n${point};2025-01-01;1,234.5;-95.505\n`,
    );
    expect(await readRepair(point)).toMatchObject({ meter_hours: '1234.50', labor_amount_cents: -9551 });
  });

  it('that cannot be kept reject their row alone', async () => {
    const [good, nul, long, broken] = [next(), next(), next(), next()];
    const state = await bringFile(
      manager,
      `repair_number,closed_on,complaint\n${good},2025-01-01,"5"" belt, torn"\n${nul},2025-01-01,a\u0000b\n${long},2025-01-01,${'x'.repeat(10_000_000)}\n${broken},2025-01-01,"5" belt"\nH-x,2025-01-01\n`,
    );
    expect(state).toMatchObject({ status: 'done', rowsRead: 5, created: 1, rejected: 4 });
    expect(await readRepair(good)).toMatchObject({ complaint: '5" belt, torn' });
    const messages = (await firstErrors(state.id)).map(({ message }: { message: string }) => message);
    expect(messages).toEqual([
      expect.stringContaining('control character'),
      expect.stringContaining('longer than 20,000'),
      expect.stringContaining('quote mark'),
      expect.stringContaining('2 cells'),
    ]);
  });

  it('behind a quote mark that is never closed bring nothing', async () => {
    const number = next();
    const state = await bringFile(
      manager,
      `repair_number,closed_on,complaint\n${number},2025-01-01,fine\nH-y,2025-01-01,"open\n`,
    );
    expect(state).toMatchObject({ status: 'failed', created: 0, analysis: 'failed' });
    expect(state.error).toContain('line 3');
    expect(await readRepair(number)).toBeUndefined();
  });

  it('of days are checked against the calendar and each other', async () => {
    const rows = ['2025-02-30', '2999-01-01', '1900-01-01', '01/02/2025', ''].map((day) => [next(), day, '']);
    const state = await bringFile(
      manager,
      csv(['repair_number', 'closed_on', 'opened_on'], ...rows, [next(), '2025-01-01', '2025-01-02']),
    );
    expect(state).toMatchObject({ created: 0, rejected: 6 });
    const messages = (await firstErrors(state.id)).map(({ message }: { message: string }) => message);
    expect(messages).toEqual([
      'is not a day written as yyyy-MM-dd',
      'lies in the future',
      'lies before 1950',
      'is not a day written as yyyy-MM-dd',
      'is missing',
      'lies before opened_on, 2025-01-02',
    ]);
  });
});

describe('machines', () => {
  it('of several makers with one serial need the maker; a serial alone goes to the only one', async () => {
    const header = ['repair_number', 'closed_on', 'unit_serial', 'maker', 'location'];
    const [a, b, c, d] = [next(), next(), next(), next()];
    const state = await bringFile(
      manager,
      csv(
        header,
        [a, '2025-01-01', 'DUP-1', 'Hollowell', ''],
        [b, '2025-01-02', 'DUP-1', 'Trask', ''],
        [c, '2025-01-03', 'dup-1', '', ''],
        [d, '2025-01-03', 'ONE-1', 'Trask', 'North'],
        [d, '2025-02-03', 'one-1', '', 'South'],
      ),
    );
    expect(state).toMatchObject({ created: 4, rejected: 1 });
    expect((await firstErrors(state.id))[0]).toMatchObject({
      column: 'unit_serial',
      message: expect.stringContaining('hollowell, trask'),
    });
    const { rows } = await house.migrator.query(
      `SELECT count(DISTINCT unit_id)::int AS units, count(*)::int AS repairs FROM repairs WHERE shop_id = $1 AND number = $2`,
      [shop.id, d],
    );
    expect(rows[0]).toEqual({ units: 1, repairs: 2 });
  });
});

describe('workbooks', () => {
  it('bring typed days, numbers and results of formulas', async () => {
    const number = next();
    const book = new ExcelJS.Workbook();
    book.addWorksheet('Empty');
    const sheet = book.addWorksheet('Repairs');
    sheet.addRow(['repair_number', 'closed_on', 'meter_hours', 'complaint', 'labor_amount']);
    sheet.addRow([
      number,
      new Date(Date.UTC(2025, 2, 4)),
      120.5,
      { richText: [{ text: 'No ' }, { text: 'spark' }] },
      { formula: '1+1', result: 95.5 },
    ]);
    const state = await bringFile(manager, Buffer.from(await book.xlsx.writeBuffer()), {
      fileName: 'repairs.xlsx',
    });
    expect(state).toMatchObject({ status: 'done', created: 1, rejected: 0 });
    expect(await readRepair(number)).toEqual({
      number,
      closed_on: '2025-03-04',
      meter_hours: '120.50',
      complaint: 'No spark',
      labor_amount_cents: 9550,
    });
  });

  it('that unpack to far more than they say are refused', async () => {
    const answer = await sendFile(manager, zipOf(deflateRawSync(Buffer.alloc(320 * 1024 * 1024))), {
      fileName: 'bomb.xlsx',
    });
    expect(answer.status).toBe(413);
    expect(answer.body.detail).toContain('300 MB');
  });
});

/** An archive of one entry that claims to be a thousand bytes. */
function zipOf(packed: Buffer): Buffer {
  const name = Buffer.from('xl/worksheets/sheet1.xml');
  const local = Buffer.alloc(30);
  local.writeUInt32LE(0x04034b50, 0);
  local.writeUInt16LE(8, 8);
  local.writeUInt32LE(packed.length, 18);
  local.writeUInt32LE(1000, 22);
  local.writeUInt16LE(name.length, 26);
  const entry = Buffer.alloc(46);
  entry.writeUInt32LE(0x02014b50, 0);
  entry.writeUInt16LE(8, 10);
  entry.writeUInt32LE(packed.length, 20);
  entry.writeUInt32LE(1000, 24);
  entry.writeUInt16LE(name.length, 28);
  const end = Buffer.alloc(22);
  end.writeUInt32LE(0x06054b50, 0);
  end.writeUInt16LE(1, 8);
  end.writeUInt16LE(1, 10);
  end.writeUInt32LE(46 + name.length, 12);
  end.writeUInt32LE(30 + name.length + packed.length, 16);
  return Buffer.concat([local, name, packed, entry, name, end]);
}
