import { describe, expect, it } from 'vitest';
import { toCsv } from '../../src/lib/csv';
import { formatsFor } from '../../src/lib/format';
import { paths, safeNext } from '../../src/paths';

const us = formatsFor({ locale: 'en-US', currency: 'USD', timeZone: 'America/Chicago' });
const de = formatsFor({ locale: 'de-DE', currency: 'EUR', timeZone: 'Europe/Berlin' });

describe('figures', () => {
  it('write a share with a thin space that does not break', () => {
    expect(us.percent(0.094)).toBe('9.4\u202f%');
    expect(de.percent(0.094)).toBe('9,4\u202f%');
    expect(us.percent(null)).toBe('–');
  });

  it('write an interval once with its unit', () => {
    expect(us.percentRange({ lower: 0.062, upper: 0.141 })).toBe('6.2–14.1\u202f%');
    expect(us.hoursRange({ lower: 262.4, upper: 338.6 })).toBe('262–339\u202fh');
  });

  it('write an open end as what it is', () => {
    expect(us.hoursRange({ lower: 120, upper: null })).toBe('120–∞\u202fh');
  });

  it('write hours with one decimal, days in words', () => {
    expect(us.hours(214)).toBe('214.0\u202fh');
    expect(us.days(1)).toBe('1 day');
    expect(us.days(34)).toBe('34 days');
    expect(us.counted(1, 'repair')).toBe('1 repair');
    expect(us.counted(1204, 'repair')).toBe('1,204 repairs');
  });

  it('write money from its smallest unit', () => {
    expect(us.money(120_450)).toBe('$1,204.50');
    expect(us.wholeMoney(120_450)).toBe('$1,205');
    expect(formatsFor({ locale: 'ja-JP', currency: 'JPY', timeZone: 'Asia/Tokyo' }).money(1200)).toContain(
      '1,200',
    );
  });
});

describe('dates', () => {
  it('never shift a business date by a zone', () => {
    expect(us.day('2026-04-01')).toBe('Apr 1, 2026');
    const kiritimati = formatsFor({ locale: 'en-US', currency: 'USD', timeZone: 'Pacific/Kiritimati' });
    expect(kiritimati.day('2026-12-31')).toBe('Dec 31, 2026');
    expect(us.month('2026-01')).toBe('January 2026');
  });

  it('write an instant in the shop’s zone', () => {
    expect(us.instant('2026-04-01T03:30:00.000Z')).toMatch(/^Mar 31, 2026, 10:30\sPM$/);
  });

  it('refuse what is no date', () => {
    expect(() => us.day('soon')).toThrow('YYYY-MM-DD');
  });
});

describe('a spreadsheet', () => {
  it('quotes what needs it and keeps numbers bare', () => {
    expect(toCsv(['a', 'b'], [['x, "y"', -1.5]])).toBe('\ufeffa,b\r\n"x, ""y""",-1.5\r\n');
  });

  it.each(['=1+1', '+1', '-cmd', '@SUM(A1)', '\tx', '\rx'])('does not run %j as a formula', (text) => {
    const cell = toCsv(['a'], [[text]])
      .split('\r\n')
      .slice(1)
      .join('\r\n');
    expect(cell.replace(/^"/, '').startsWith(`'${text}`)).toBe(true);
  });
});

describe('paths', () => {
  it('leave out what is empty and escape the rest', () => {
    expect(paths.repairs({ q: 'a&b', from: undefined })).toBe('/repairs?q=a%26b');
    expect(paths.part('a/b', { model: 'm' })).toBe('/parts/a%2Fb?model=m');
  });

  it.each(['//evil.example', 'https://evil.example', '/\\evil.example', '', null])(
    'do not lead out of the application: %s',
    (next) => {
      expect(safeNext(next)).toBe('/');
    },
  );

  it('lead back to where someone was', () => {
    expect(safeNext('/parts?x=1')).toBe('/parts?x=1');
  });
});
