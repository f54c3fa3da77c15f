import { useState } from 'react';
import type { ImportKind } from '../../../shared/imports';
import { Button } from '../../components/ui/button';
import { Segmented } from '../../components/ui/segmented';
import { classNames } from '../../lib/class-names';
import { toCsv } from '../../lib/csv';
import { downloadText } from '../../lib/download';
import { KIND_OPTIONS, KINDS } from './import-words';
import { NATIVE_COLUMNS } from './native-columns';

type Props = {
  kind: ImportKind;
  onKind: (kind: ImportKind) => void;
  onFile: (file: File) => void;
  isBusy: boolean;
  fileName: string | undefined;
};

/** What the file holds, and the file: chosen by a click, by the keyboard, or dropped. */
export function PickFile({ kind, onKind, onFile, isBusy, fileName }: Props) {
  const [isOver, setOver] = useState(false);
  const take = (files: FileList | null) => {
    const [file] = files ?? [];
    if (file) onFile(file);
  };
  return (
    <div className="flex flex-col gap-3">
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <span className="text-table font-label" aria-hidden="true">
          It holds
        </span>
        <Segmented label="It holds" value={kind} onChange={onKind} options={KIND_OPTIONS} />
      </div>
      <p className="max-w-[44rem] text-sm text-dim">{KINDS[kind].about}</p>
      <label
        className={classNames(
          'flex min-h-28 cursor-pointer flex-col items-center justify-center gap-1 rounded-bench border border-dashed px-4 py-5 text-center has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-layout',
          isOver ? 'border-layout bg-wash' : 'border-edge hover:bg-wash/60',
        )}
        onDragOver={(event) => {
          event.preventDefault();
          setOver(true);
        }}
        onDragLeave={() => setOver(false)}
        onDrop={(event) => {
          event.preventDefault();
          setOver(false);
          take(event.dataTransfer.files);
        }}
      >
        <input
          type="file"
          className="sr-only"
          aria-label="File of records"
          accept=".csv,.tsv,.txt,.xlsx"
          disabled={isBusy}
          onChange={({ target }) => {
            take(target.files);
            // The same file can be chosen again once it has been corrected.
            target.value = '';
          }}
        />
        <span className="font-label text-layout">
          {isBusy
            ? 'Looking at the file'
            : fileName
              ? `${fileName}: choose another`
              : 'Choose a file, or drop it here'}
        </span>
        <span className="text-sm text-dim">CSV or XLSX. Nothing is taken in before you say so.</span>
      </label>
      <p className="text-sm text-dim">
        No export at hand?{' '}
        <Button
          look="text"
          className="text-sm underline underline-offset-3"
          onClick={() => downloadText(`${kind}.csv`, toCsv(NATIVE_COLUMNS[kind], []))}
        >
          Take an empty file of {KINDS[kind].file}
        </Button>{' '}
        with a header row that needs no answers.
      </p>
    </div>
  );
}
