import type { MonthReview, RateRow } from '../../shared/reports';

/** A month's row with believable limits; what is given wins. */
export function rateRow(month: string, count: number, size: number, given: Partial<RateRow> = {}): RateRow {
  const rate = size === 0 ? null : count / size;
  const spread = size === 0 ? 0 : Math.sqrt(0.07 / size);
  return {
    month,
    key: month,
    label: month,
    count,
    size,
    rate,
    interval:
      rate === null
        ? { lower: 0, upper: 1 }
        : { lower: Math.max(0, rate - 1.9 * spread), upper: rate + 2.2 * spread },
    oursCount: Math.floor(count / 2),
    oursRate: size === 0 ? null : Math.floor(count / 2) / size,
    maturing: false,
    projected: null,
    limits: size === 0 ? null : { lower: 0, upper: 0.076 + 3 * spread },
    shrunken: rate,
    shrunkenInterval: null,
    ...given,
  };
}

const SIZES = [
  190, 151, 96, 60, 44, 52, 101, 128, 171, 240, 248, 226, 199, 160, 104, 66, 48, 57, 110, 150, 190, 212,
];
const COUNTS = [13, 12, 6, 5, 3, 4, 8, 9, 12, 20, 19, 17, 15, 14, 7, 5, 3, 4, 9, 11, 15, 31];

/** A review of April 2026 with a signal in the PTO drives, as of late July. */
export function monthReview(given: Partial<MonthReview> = {}): MonthReview {
  const settled = SIZES.map((size, index) => rateRow(monthAt(index), COUNTS[index] ?? 0, size));
  const open = [
    rateRow('2026-05', 15, 205, { maturing: true, projected: 0.081 }),
    rateRow('2026-06', 8, 188, { maturing: true, projected: 0.083 }),
    rateRow('2026-07', 1, 60, { maturing: true, projected: 0.079 }),
  ];
  return {
    windowDays: 90,
    asOf: '2026-07-24',
    analysis: 'ready',
    month: '2026-04',
    repairsInAll: 9204,
    unidentified: 318,
    rows: [...settled, ...open],
    center: 0.076,
    isSignal: true,
    signalSystem: { system: 'PTO drive', count: 11 },
    firstVisitCure: { cured: 1014, of: 1204, interval: { lower: 0.82, upper: 0.862 } },
    byTheDoor: { count: 12, fromMonth: '2026-03', toMonth: '2026-05' },
    costCents: 421_050,
    costOfComebacks: 31,
    drivers: [
      driver(
        'PTO clutch',
        'Tarnlow R42',
        61,
        14,
        0.19,
        0.12,
        0.29,
        9.1,
        214_000,
        'gap not set after fitting',
      ),
      driver(
        'PTO switch',
        'Tarnlow R42',
        44,
        12,
        0.21,
        0.12,
        0.33,
        8.6,
        131_000,
        'switch replaced, clutch not',
      ),
      driver('Deck belt', 'Oakrill Z52', 90, 13, 0.13, 0.08, 0.2, 5.4, 99_000, null),
      driver('Carburetor', null, 210, 19, 0.09, 0.06, 0.13, 2.2, 172_000, 'stale fuel, back in spring'),
    ],
    todos: [
      {
        kind: 'comebacks',
        text: '3 comebacks to look at',
        detail: 'oldest waits 9 days',
        count: 3,
        path: '/comebacks?status=suggested',
      },
      {
        kind: 'meter',
        text: '9 machines: hour reading went down',
        detail: 'in Tuesday’s import; their hours are not used yet',
        count: 9,
        path: '/imports',
      },
    ],
    ...given,
  };
}

function driver(
  component: string,
  model: string | null,
  size: number,
  count: number,
  shrunken: number,
  lower: number,
  upper: number,
  beyondAverage: number,
  costCents: number,
  oftenWhy: string | null,
): MonthReview['drivers'][number] {
  return {
    component: { id: component.toLowerCase().replaceAll(' ', '-'), name: component },
    model: model === null ? null : { id: model.toLowerCase().replaceAll(' ', '-'), name: model },
    size,
    count,
    rate: count / size,
    shrunken,
    shrunkenInterval: { lower, upper },
    beyondAverage,
    costCents,
    oftenWhy,
  };
}

function monthAt(index: number): string {
  return new Date(Date.UTC(2024, 6 + index, 1)).toISOString().slice(0, 7);
}
