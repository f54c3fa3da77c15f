import type { FilePreview } from '../../../shared/imports';
import { Segmented } from '../../components/ui/segmented';
import { dateQuestion, type Answers } from './answers';
import { DATE_SHAPES, isDateFormat } from './date-shapes';

type Props = { preview: FilePreview; answers: Answers; onChange: (answers: Answers) => void };

const DELIMITERS: Readonly<Record<string, string>> = {
  ',': 'commas',
  ';': 'semicolons',
  '\t': 'tabs',
  '|': 'upright strokes',
};

const ENCODINGS: Readonly<Record<string, string>> = {
  'utf-8': 'UTF-8: all its bytes are valid as such',
  'utf-16le': 'UTF-16: its first bytes say so',
  'utf-16be': 'UTF-16: its first bytes say so',
  'windows-1252': 'Windows-1252: its bytes are not UTF-8',
};

/** How the file writes days and numbers: a question only where the file does not answer it. */
export function HowWritten({ preview, answers, onChange }: Props) {
  const question = dateQuestion(preview, answers);
  return (
    <div className="flex flex-col gap-4">
      {question && (
        <fieldset className="border-l-2 border-brass py-1 pl-4">
          <legend className="float-left mb-1 w-full font-heading">How are the dates written?</legend>
          <p className="clear-both text-dim">{question.reason}</p>
          <p className="text-sm text-dim">For example: {question.samples.slice(0, 4).join(' · ')}</p>
          <div className="mt-1 flex flex-wrap gap-x-6">
            {question.options.map((format) => (
              <label key={format} className="inline-flex min-h-11 items-center gap-2 desk:min-h-8">
                <input
                  type="radio"
                  name="dateFormat"
                  className="size-[18px] accent-layout"
                  checked={answers.dateFormat === format}
                  onChange={() => onChange({ ...answers, dateFormat: format })}
                />
                {DATE_SHAPES[format].words}
              </label>
            ))}
          </div>
        </fieldset>
      )}
      <dl className="grid gap-x-6 gap-y-1 text-table desk:grid-cols-[auto_1fr]">
        {!question && answers.dateFormat && isDateFormat(answers.dateFormat) && (
          <>
            <dt className="text-dim">Dates</dt>
            <dd>
              {DATE_SHAPES[answers.dateFormat].words}.{' '}
              <span className="text-dim">{preview.dateFormatReason}</span>
            </dd>
          </>
        )}
        <dt className="self-center text-dim">Decimals</dt>
        <dd className="flex flex-wrap items-center gap-x-3">
          <Segmented
            label="Decimals"
            value={answers.decimal}
            onChange={(decimal) => onChange({ ...answers, decimal })}
            options={[
              { value: '.', label: '12.50' },
              { value: ',', label: '12,50' },
            ]}
          />
          <span className="text-dim">{decimalReason(preview)}</span>
        </dd>
        <dt className="text-dim">Columns are cut</dt>
        <dd>
          {preview.delimiter === null
            ? 'as cells of a workbook; its first sheet is read'
            : `by ${DELIMITERS[preview.delimiter] ?? preview.delimiter}: so the first lines fall into the same number of columns`}
        </dd>
        {preview.format === 'csv' && (
          <>
            <dt className="text-dim">Letters</dt>
            <dd>{ENCODINGS[preview.encoding] ?? preview.encoding}</dd>
          </>
        )}
      </dl>
    </div>
  );
}

function decimalReason({ isRemembered, decimal, delimiter }: FilePreview): string {
  if (isRemembered) return 'as confirmed for such a file before';
  if (decimal === ',') return 'the columns are cut by semicolons, and no number has a point';
  return delimiter === ';'
    ? 'some number has a point'
    : 'the usual way where columns are not cut by semicolons';
}
