import { parse } from 'csv-parse/sync';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { CsvParser } from '../../server/imports/csv-parser';
import { parseDay } from '../../server/imports/parse-date';
import { parseDecimal, toCents } from '../../server/imports/parse-number';
import { parseWord } from '../../server/imports/parse-word';
import { proposeDateFormat } from '../../server/imports/propose-dates';
import { guardCell, restoreCells } from '../../server/imports/rejected-cells';
import { namesIn } from '../../server/db/technician-names';

describe('CsvParser', () => {
  const cell = fc.string({ unit: fc.constantFrom('a', '"', ',', ';', ' ', '\n', '\r\n', 'é'), maxLength: 6 });
  const table = fc.array(fc.array(cell, { minLength: 1, maxLength: 4 }), { minLength: 1, maxLength: 6 });
  const write = (rows: string[][], lineEnd: string) =>
    rows.map((row) => row.map((value) => `"${value.replaceAll('"', '""')}"`).join(',')).join(lineEnd);

  it('reads what csv-parse reads, however the text is cut', () => {
    fc.assert(
      fc.property(
        table,
        fc.constantFrom('\n', '\r\n'),
        fc.integer({ min: 1, max: 9 }),
        (rows, lineEnd, step) => {
          const text = write(rows, lineEnd);
          const parser = new CsvParser(',');
          const found: string[][] = [];
          for (let at = 0; at < text.length; at += step) {
            found.push(...parser.push(text.slice(at, at + step)).map(({ cells }) => cells));
          }
          found.push(...parser.end().map(({ cells }) => cells));
          const oracle: string[][] = parse(text, { relax_column_count: true, record_delimiter: lineEnd });
          // Rows of nothing at all are left out.
          expect(found).toEqual(oracle.filter((row) => row.length > 1 || row[0] !== ''));
        },
      ),
      { seed: 20250501, numRuns: 400 },
    );
  });

  it('knows the line on which each row begins', () => {
    const parser = new CsvParser(';');
    const rows = [...parser.push('a;b\r\n1;"x\r\ny"\r\n\r\n2;3\r\n4;'), ...parser.end()];
    expect(rows.map(({ line, cells }) => [line, ...cells])).toEqual([
      [1, 'a', 'b'],
      [2, '1', 'x\r\ny'],
      [5, '2', '3'],
      [6, '4', ''],
    ]);
  });
});

describe('days', () => {
  it.each([
    ['2024-02-29', 'yyyy-MM-dd', '2024-02-29'],
    ['2023-02-29', 'yyyy-MM-dd', undefined],
    ['3/4/24', 'M/d/yyyy', '2024-03-04'],
    ['3/4/2024 10:15 PM', 'd/M/yyyy', '2024-04-03'],
    ['4.3.2024', 'd.M.yyyy', '2024-03-04'],
    ['20240304', 'yyyyMMdd', '2024-03-04'],
    ['4-Mar-2024', 'd-MMM-yyyy', '2024-03-04'],
    ['March 4, 2024', 'MMM d, yyyy', '2024-03-04'],
    ['2024-03-04T23:00:00Z', 'M/d/yyyy', '2024-03-04'],
    ['13/1/2024', 'M/d/yyyy', undefined],
    ['soon', 'M/d/yyyy', undefined],
  ] as const)('%s as %s is %s', (text, format, day) => {
    expect(parseDay(text, format)).toBe(day);
  });

  it('of a file are told apart by the days above 12 alone', () => {
    expect(proposeDateFormat(['01/02/2024', '13/02/2024']).dateFormat).toBe('d/M/yyyy');
    expect(proposeDateFormat(['01/02/2024', '02/13/2024']).dateFormat).toBe('M/d/yyyy');
    expect(proposeDateFormat(['01/02/2024', '12/12/2024']).dateFormat).toBeNull();
    expect(proposeDateFormat(['13/02/2024', '02/13/2024']).dateFormat).toBeNull();
  });
});

describe('numbers', () => {
  it.each([
    ['1,234.50', '.', '1234.50'],
    ['1.234,50', ',', '1234.50'],
    ['1,5', '.', undefined],
    ['1.5', ',', undefined],
    ['(12.00)', '.', '-12.00'],
    ['-$12.00', '.', '-12.00'],
    ['12-', '.', '-12'],
    ['1,23,456', '.', undefined],
    ['', '.', undefined],
    ['.', '.', undefined],
    ['1e5', '.', undefined],
  ] as const)('%s with decimal %s is %s', (text, decimal, plain) => {
    expect(parseDecimal(text, decimal)).toBe(plain);
  });

  it('become cents, half a cent away from zero', () => {
    expect(['1.005', '-1.005', '0.004', '-0.004', '12', '.5'].map(toCents)).toEqual([
      101, -101, 0, 0, 1200, 50,
    ]);
    fc.assert(
      fc.property(fc.integer({ min: -2_000_000_000, max: 2_000_000_000 }), (cents) => {
        const text = `${cents < 0 ? '-' : ''}${Math.trunc(Math.abs(cents) / 100)}.${String(Math.abs(cents) % 100).padStart(2, '0')}`;
        expect(toCents(text)).toBe(cents === 0 ? 0 : cents);
      }),
      { seed: 7 },
    );
  });
});

describe('words and names', () => {
  it('fold case, spaces and hyphens, and take plain synonyms', () => {
    expect(parseWord('Zero-Turn', 'productType')).toBe('zero_turn');
    expect(parseWord('ZTR', 'productType')).toBe('zero_turn');
    expect(parseWord('TESTED GOOD', 'workDone')).toBe('tested_good');
    expect(parseWord('worn', 'lineReason')).toBeUndefined();
  });

  it('of technicians are split where people put more than one, never at a comma', () => {
    expect(namesIn('Dale / Rosa and Uma & Ty+Bo')).toEqual(['Dale', 'Rosa', 'Uma', 'Ty', 'Bo']);
    expect(namesIn('Kettering, Dale')).toEqual(['Kettering, Dale']);
    expect(namesIn('Sandy Anders')).toEqual(['Sandy Anders']);
  });
});

describe('cells of rejected rows', () => {
  it('are no formulas for a spreadsheet, and come back as they were', () => {
    expect(['=1+1', '@x', '-5.00', '+1 555 0100', '-cmd', '\tx', 'plain'].map(guardCell)).toEqual([
      "'=1+1",
      "'@x",
      '-5.00',
      '+1 555 0100',
      "'-cmd",
      "'\tx",
      'plain',
    ]);
    fc.assert(
      fc.property(fc.string({ unit: fc.constantFrom("'", '=', '-', 'a', '1', '\t') }), (text) => {
        expect(restoreCells([guardCell(text)])).toEqual([text]);
      }),
      { seed: 11 },
    );
  });
});
