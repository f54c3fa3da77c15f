import { describe, expect, it } from 'vitest';
import type { FilePreview } from '../../shared/imports';
import {
  dateQuestion,
  firstAnswers,
  mappingOf,
  oddities,
  stillNeeded,
  withColumn,
} from '../../src/features/imports/answers';
import { NATIVE_COLUMNS } from '../../src/features/imports/native-columns';
import { COLUMNS } from '../../server/imports/columns';

const COLUMN = (name: string, isRequired = false) => ({ name, label: name, about: 'About', isRequired });

function previewOf(
  columns: readonly [header: string, column: string | null, samples: string[]][],
  more: Partial<FilePreview> = {},
): FilePreview {
  return {
    spoolId: 's',
    fileName: 'may.csv',
    bytes: 100,
    format: 'csv',
    encoding: 'utf-8',
    delimiter: ',',
    decimal: '.',
    dateFormat: 'yyyy-MM-dd',
    dateFormatReason: 'Dates such as 2026-05-04 are year, month, day.',
    isRemembered: false,
    headers: columns.map(([header]) => header),
    rows: [columns.map(([, , samples]) => samples[0] ?? '')],
    proposals: columns.map(([header, column, samples]) => ({
      header,
      column,
      reason: '',
      certainty: header === column ? 'native' : column ? 'likely' : 'none',
      samples,
    })),
    columns: [COLUMN('repair_number', true), COLUMN('closed_on', true), COLUMN('opened_on'), COLUMN('notes')],
    problems: [],
    ...more,
  };
}

describe('answers to a file', () => {
  const preview = previewOf([
    ['repair_number', 'repair_number', ['1']],
    ['Wrapped', null, ['2026-05-04']],
    ['notes', 'notes', ['x']],
  ]);

  it('need what must be there, and no more once it is said', () => {
    const answers = firstAnswers(preview);
    expect(stillNeeded(preview, 'repairs', answers)).toEqual(['Which column is “closed_on”? About.']);
    expect(stillNeeded(preview, 'repairs', withColumn(answers, 1, 'closed_on'))).toEqual([]);
  });

  it('keep each of our columns in one place', () => {
    const answers = withColumn(firstAnswers(preview), 1, 'repair_number');
    expect(answers.columns).toEqual([null, 'repair_number', 'notes']);
  });

  it('say to the server that a header of our own shall not be read', () => {
    const answers = withColumn(withColumn(firstAnswers(preview), 1, 'closed_on'), 2, null);
    expect(mappingOf(preview, answers)).toEqual({
      columns: { repair_number: 'repair_number', closed_on: 'Wrapped', notes: '' },
      decimal: '.',
      dateFormat: 'yyyy-MM-dd',
    });
  });

  it('leave out columns that no header names alone', () => {
    const twice = previewOf([
      ['Date', 'closed_on', ['2026-05-04']],
      ['Date', null, ['2026-05-04']],
      ['', null, ['x']],
    ]);
    expect(firstAnswers(twice).columns).toEqual([null, null, null]);
  });
});

describe('the question about dates', () => {
  const open = { dateFormat: null, dateFormatReason: 'No day above 12 tells them apart.' } as const;

  it('is asked where day and month cannot be told apart', () => {
    const preview = previewOf(
      [
        ['repair_number', 'repair_number', ['1']],
        ['Out', 'closed_on', ['03/04/2026', '05/06/2026']],
      ],
      open,
    );
    const answers = firstAnswers(preview);
    expect(dateQuestion(preview, answers)?.options).toEqual(['M/d/yyyy', 'd/M/yyyy']);
    expect(stillNeeded(preview, 'repairs', answers)).toEqual(['How are the dates written?']);
    expect(stillNeeded(preview, 'repairs', { ...answers, dateFormat: 'd/M/yyyy' })).toEqual([]);
  });

  it('is not asked where the file answers it', () => {
    const preview = previewOf([['closed_on', 'closed_on', ['2026-05-04']]]);
    expect(dateQuestion(preview, firstAnswers(preview))).toBeNull();
  });

  it('does not let one slip hide how the others are written', () => {
    const preview = previewOf([['closed_on', 'closed_on', ['2026-05-04', '2026-05-40', '2026-05-06']]], open);
    const answers = firstAnswers(preview);
    expect(answers.dateFormat).toBe('yyyy-MM-dd');
    expect(dateQuestion(preview, answers)?.reason).toContain('2026-05-40');
  });

  it('comes up when a column is added that is written in another way', () => {
    const preview = previewOf([
      ['repair_number', 'repair_number', ['1']],
      ['closed_on', 'closed_on', ['2026-05-04']],
      ['In', null, ['5/14/26']],
    ]);
    const answers = withColumn(firstAnswers(preview), 2, 'opened_on');
    expect(dateQuestion(preview, answers)?.reason).toContain('5/14/26');
  });
});

it('what cannot be answered here is shown as odd, the rest is a question', () => {
  const problems = [
    'The file has a header row and nothing below it.',
    'No column was “Closed”. Say which it is.',
  ];
  expect(oddities(previewOf([], { problems }))).toEqual([problems[0]]);
});

it.each(['repairs', 'units', 'parts'] as const)(
  'the empty file of %s has every column the server reads',
  (kind) => expect(NATIVE_COLUMNS[kind]).toEqual(COLUMNS[kind].map(({ name }) => name)),
);
