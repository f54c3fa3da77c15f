import { describe, expect, test } from 'vitest';
import {
  readsAsDeclined,
  readsAsLeftOpen,
  readsAsOperatorOrFuel,
  readsAsService,
  readsAsTrouble,
  STARTER_COMPLAINT_PHRASES,
  systemReader,
} from '../../../analytics/records/trouble-words';

test.each([
  "WON'T START",
  'Wont start, cranks fine',
  'BLADES NOT ENGAGING',
  'dies when hot',
  'Oil change. Also leaking gas',
  'mower keeps blowing the fuse',
  'LOUD SQUEALING NOISE',
  'SERVICE, DOES NOT CHARGE',
  'blade will not turn on',
  'same problem as last week',
  'hard to start',
  'loses power and shuts off',
])('%j is a trouble', (complaint) => {
  expect(readsAsTrouble(complaint)).toBe(true);
});

test.each([
  'ANNUAL SERVICE',
  'oil change and sharpen blades',
  '50 hr service, no problems',
  'No leaks, no complaints. Winterize',
  "customer won't be home, call first",
  'Spring tune-up, runs good',
  'set up new machine',
  'break in oil change',
  '',
  null,
  undefined,
])('%j is none', (complaint) => {
  expect(readsAsTrouble(complaint)).toBe(false);
});

test('an order for service that names a trouble is none', () => {
  expect(readsAsService('Annual service')).toBe(true);
  expect(readsAsService('Annual service, wont start')).toBe(false);
  expect(readsAsService('look over')).toBe(false);
});

test('declined work, fuel and operation, and work left open, in the words of records', () => {
  expect(readsAsDeclined(null, 'CUST DECLINED CLUTCH')).toBe(true);
  expect(readsAsDeclined("Customer didn't approve the spindle")).toBe(true);
  expect(readsAsDeclined('replaced clutch')).toBe(false);
  expect(readsAsOperatorOrFuel('STALE FUEL in bowl')).toBe(true);
  expect(readsAsOperatorOrFuel('hit a stump')).toBe(true);
  expect(readsAsOperatorOrFuel('fuel pump weak')).toBe(false);
  expect(readsAsLeftOpen('Temporary fix, part is backordered')).toBe(true);
  expect(readsAsLeftOpen('completed')).toBe(false);
});

describe('systems of a complaint', () => {
  const read = systemReader([
    { phrase: 'deck', systemId: 'cutting deck' },
    { phrase: "won't crank", systemId: 'starting' },
    { phrase: '  ', systemId: 'nothing' },
  ]);

  test('by whole words, whatever the case and the marks', () => {
    expect(read('DECK BELT; WONT-CRANK')).toEqual(['cutting deck', 'starting']);
    expect(read('decking screws')).toEqual([]);
    expect(read(null)).toEqual([]);
  });

  test('the starter table points to the systems of the trade only', () => {
    const systems = new Set(STARTER_COMPLAINT_PHRASES.map(({ system }) => system));
    expect([...systems].sort()).toEqual([
      'PTO drive',
      'charging',
      'chassis',
      'cutting deck',
      'drive',
      'engine',
      'fuel',
      'ignition',
      'safety circuit',
      'starting',
    ]);
    const starter = systemReader(
      STARTER_COMPLAINT_PHRASES.map(({ phrase, system }) => ({ phrase, systemId: system })),
    );
    expect(starter("Blades won't engage")).toEqual(['PTO drive']);
    expect(starter('engine cranks, no spark')).toEqual(['ignition']);
  });
});
