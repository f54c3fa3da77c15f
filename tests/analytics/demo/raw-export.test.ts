import { parse } from 'csv-parse/sync';
import { describe, expect, it } from 'vitest';
import { csvPieces, toCsv } from '../../../server/demo/csv';
import { rawExport } from '../../../server/demo/raw-export';

const AS_OF = '2025-09-30';
const text = rawExport({ asOf: AS_OF });
const rows = parse(text, { columns: true }) as Record<string, string>[];
const tickets = [...new Map(rows.map((row) => [row['Ticket #'], row])).values()];

describe('the raw export of a long-tail shop', () => {
  it('has about three thousand tickets on some hundreds of models', () => {
    expect(tickets.length).toBeGreaterThan(2600);
    expect(tickets.length).toBeLessThan(3500);
    const plain = new Set(
      tickets.map((row) => `${row['Make']?.slice(0, 4)}${row['Model']?.replace(/\W/g, '')}`.toLowerCase()),
    );
    expect(plain.size).toBeGreaterThan(200);
    expect(new Set(tickets.map((row) => row['Model'])).size).toBeGreaterThan(1.8 * plain.size);
  });

  it('leaves out what such a program leaves out', () => {
    const withSerial = tickets.filter((row) => row['S/N'] !== '').length / tickets.length;
    expect(withSerial).toBeGreaterThan(0.4);
    expect(withSerial).toBeLessThan(0.6);
    expect(Object.keys(rows[0] ?? {}).some((name) => /component|reason|causal/i.test(name))).toBe(false);
    expect(tickets.every((row) => row['Notes'] === row['Notes']?.toUpperCase())).toBe(true);
    expect(tickets.every((row) => /^\d{1,2}\/\d{1,2}\/\d{4}$/.test(row['Date Closed'] ?? ''))).toBe(true);
  });

  it('is the same for the same day and seed', () => {
    expect(rawExport({ asOf: AS_OF })).toBe(text);
  });
});

describe('the CSV writer', () => {
  it('quotes what RFC 4180 wants quoted and reads back as it was', () => {
    const hard = [
      { a: 'plain', b: 'says "hi", twice' },
      { a: 'two\r\nlines', b: '' },
    ];
    const written = toCsv(hard, ['a', 'b']);
    expect(written).toBe('a,b\r\nplain,"says ""hi"", twice"\r\n"two\r\nlines",\r\n');
    expect(parse(written, { columns: true })).toEqual(hard);
  });

  it('writes the same in pieces', () => {
    const many = Array.from({ length: 2500 }, (_, index) => ({ a: String(index) }));
    const pieces = [...csvPieces(many, ['a'])];
    expect(pieces).toHaveLength(3);
    expect(pieces.join('')).toBe(toCsv(many, ['a']));
  });
});
