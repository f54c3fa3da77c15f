import type { FilePreview } from '../../../shared/imports';
import { Select } from '../../components/ui/select';
import { classNames } from '../../lib/class-names';
import { isReadable, type Answers } from './answers';

type Props = {
  preview: FilePreview;
  answers: Answers;
  onChoose: (at: number, column: string | null) => void;
};

const CERTAINTY: Record<FilePreview['proposals'][number]['certainty'], string> = {
  native: 'sure',
  remembered: 'as last time',
  likely: 'likely',
  guess: 'a guess',
  none: 'not known',
};

/** The file's first rows; over each column what it seems to mean, and why, to be put right there. */
export function ColumnHeads({ preview, answers, onChoose }: Props) {
  return (
    <div className="overflow-x-auto" tabIndex={0} role="group" aria-label="The first rows of the file">
      <table className="border-collapse text-table">
        <caption className="sr-only">
          The first rows of {preview.fileName}, with what each column means
        </caption>
        <thead>
          <tr className="align-top">
            {preview.headers.map((header, at) => (
              <th
                key={at}
                scope="col"
                className="w-[13rem] max-w-[13rem] min-w-[13rem] border-b border-rule pr-4 pb-2 text-left font-text"
              >
                <Head preview={preview} answers={answers} header={header} at={at} onChoose={onChoose} />
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {preview.rows.map((row, index) => (
            <tr key={index}>
              {preview.headers.map((_, at) => (
                <td
                  key={at}
                  className={classNames(
                    'max-w-[13rem] border-b border-rule py-1.5 pr-4 align-top',
                    answers.columns[at] === null && 'text-dim',
                  )}
                >
                  <span className="line-clamp-2 break-words">{row[at]}</span>
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

type HeadProps = Props & { header: string; at: number };

function Head({ preview, answers, header, at, onChoose }: HeadProps) {
  const name = header.trim() === '' ? `column ${at + 1}` : header;
  const chosen = answers.columns[at] ?? null;
  const proposal = preview.proposals[at];
  const isOwn = proposal !== undefined && chosen !== proposal.column;
  const about = preview.columns.find((column) => column.name === chosen)?.about;
  if (!isReadable(preview, at)) {
    return (
      <>
        <span className="block truncate font-heading">{name}</span>
        <span className="mt-2 block text-sm text-dim">
          {header.trim() === ''
            ? 'It has no header, so it is not read. Give it one in the file if it matters.'
            : 'Several columns are headed so, and none of them is read. Rename one in the file if it matters.'}
        </span>
      </>
    );
  }
  return (
    <>
      <span className="block truncate font-heading" title={header}>
        {name}
      </span>
      <Select
        className="mt-1.5"
        label={`What “${name}” means`}
        value={chosen ?? ''}
        onChange={(column) => onChoose(at, column || null)}
        options={[
          { value: '', label: 'leave it out' },
          ...preview.columns.map((column) => ({
            value: column.name,
            label: optionLabel(column, preview, answers, at),
          })),
        ]}
      />
      <span className="mt-1 block text-sm text-dim">
        {isOwn || !proposal ? (
          <>
            <Certainty text="as you say" /> {about ?? 'It is not read.'}
          </>
        ) : (
          <>
            <Certainty text={CERTAINTY[proposal.certainty]} isWeak={proposal.certainty === 'guess'} />{' '}
            {proposal.reason}
          </>
        )}
      </span>
    </>
  );
}

function Certainty({ text, isWeak = false }: { text: string; isWeak?: boolean }) {
  return <span className={classNames('font-label', isWeak ? 'text-brass' : 'text-ink')}>{text}:</span>;
}

/** An answer that another column has already says so; choosing it moves it here. */
function optionLabel(
  column: FilePreview['columns'][number],
  preview: FilePreview,
  answers: Answers,
  at: number,
): string {
  const holder = answers.columns.indexOf(column.name);
  return holder === -1 || holder === at
    ? column.label
    : `${column.label} (now “${preview.headers[holder] ?? ''}”)`;
}
