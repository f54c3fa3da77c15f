import type { FilePreview, ImportKind, Mapping } from '../../../shared/imports';
import { areWritten, formatsFor, type DateFormat } from './date-shapes';

/** What a person has answered of a file so far; `columns` stand by the place of the header. */
export type Answers = {
  columns: readonly (string | null)[];
  /** Null until it is said, where the file cannot tell. */
  dateFormat: DateFormat | null;
  decimal: '.' | ',';
};

export function firstAnswers(preview: FilePreview): Answers {
  const answers: Answers = {
    columns: preview.proposals.map(({ column }, at) => (isReadable(preview, at) ? column : null)),
    dateFormat: preview.dateFormat,
    decimal: preview.decimal,
  };
  const question = dateQuestion(preview, answers);
  const [only, another] = question?.options ?? [];
  return only && !another ? { ...answers, dateFormat: only } : answers;
}

/** A column is named to the server by its header, so one without, or with another's, cannot be read. */
export const isReadable = ({ headers }: FilePreview, at: number): boolean => {
  const header = headers[at] ?? '';
  return header.trim() !== '' && headers.indexOf(header) === headers.lastIndexOf(header);
};

/** Says what one column is; another one that was said to be the same is let go. */
export function withColumn(answers: Answers, at: number, column: string | null): Answers {
  return {
    ...answers,
    columns: answers.columns.map((old, other) =>
      other === at ? column : column !== null && old === column ? null : old,
    ),
  };
}

export function mappingOf(preview: FilePreview, answers: Answers): Mapping {
  const columns: Record<string, string> = {};
  preview.proposals.forEach(({ certainty, column, header }, at) => {
    const said = answers.columns[at] ?? null;
    // A header of our own maps itself unless it is said that it shall not.
    if (certainty === 'native' && column !== null && !answers.columns.includes(column)) columns[column] = '';
    if (said !== null) columns[said] = header;
  });
  return {
    columns,
    decimal: answers.decimal,
    ...(answers.dateFormat === null ? {} : { dateFormat: answers.dateFormat }),
  };
}

/** What must be said before the file can be read. */
export function stillNeeded(preview: FilePreview, kind: ImportKind, answers: Answers): string[] {
  const has = (name: string) => answers.columns.includes(name);
  const lacking = preview.columns
    .filter(({ isRequired, name }) => isRequired && !has(name))
    .map(({ label, about }) => `Which column is “${label}”? ${about}.`);
  if (kind === 'units' && !has('unit_serial') && !has('unit_ref'))
    lacking.push('Which column is the machine’s serial number, or your own tag?');
  const dates = dateQuestion(preview, answers);
  if (dates && !dates.options.some((option) => option === answers.dateFormat))
    lacking.push('How are the dates written?');
  return lacking;
}

export type DateQuestion = { samples: string[]; options: DateFormat[]; reason: string };

/** Asked only where the file leaves it open, or a column was added that is written in another way. */
export function dateQuestion(preview: FilePreview, answers: Answers): DateQuestion | null {
  const places = answers.columns.flatMap((column, at) => (column?.endsWith('_on') ? [at] : []));
  const samples = [...new Set(places.flatMap((at) => preview.proposals[at]?.samples ?? []))];
  if (samples.length === 0) return null;
  if (preview.dateFormat !== null && areWritten(samples, preview.dateFormat)) return null;
  const options = formatsFor(samples);
  const usual = preview.dateFormat ?? (options.length === 1 ? options[0] : undefined);
  const odd = usual && samples.find((sample) => !areWritten([sample], usual));
  const reason = odd ? `“${odd}” is not written like the other dates.` : preview.dateFormatReason;
  return { samples, options, reason };
}

/** What is odd about the file itself and cannot be answered here; the questions stand by themselves. */
export function oddities({ problems, dateFormatReason }: FilePreview): string[] {
  return problems.filter((problem) => !problem.endsWith('Say which it is.') && problem !== dateFormatReason);
}
