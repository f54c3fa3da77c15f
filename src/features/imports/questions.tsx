import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useNavigate } from 'react-router';
import type { FilePreview, ImportKind } from '../../../shared/imports';
import { Button } from '../../components/ui/button';
import { Sheet } from '../../components/ui/sheet';
import { ApiError } from '../../lib/api';
import { useFormats } from '../../lib/session';
import { paths } from '../../paths';
import { firstAnswers, mappingOf, oddities, stillNeeded, withColumn } from './answers';
import { ColumnHeads } from './column-heads';
import { HowWritten } from './how-written';
import { KINDS } from './import-words';
import { startImport } from './queries';
import { Trial } from './trial';

type Props = { preview: FilePreview; kind: ImportKind };

/** Everything that is to be asked of a file, on one page with its first rows. */
export function Questions({ preview, kind }: Props) {
  const [answers, setAnswers] = useState(() => firstAnswers(preview));
  const formats = useFormats();
  const navigate = useNavigate();
  const client = useQueryClient();
  const needed = stillNeeded(preview, kind, answers);
  const send = useMutation({
    mutationFn: (isDryRun: boolean) =>
      startImport({ spoolId: preview.spoolId, kind, mapping: mappingOf(preview, answers), isDryRun }),
    onSuccess: (state) => {
      void client.invalidateQueries({ queryKey: ['imports', 'list'] });
      if (!state.isDryRun) void navigate(paths.import(state.id));
    },
  });
  const change = (next: typeof answers) => {
    setAnswers(next);
    // What was tried was tried with other answers.
    send.reset();
  };
  const read = answers.columns.filter((column) => column !== null).length;

  return (
    <Sheet
      title={`What ${preview.fileName} says`}
      sub={`${formats.counted(read, 'column')} of ${formats.count(preview.headers.length)} would be read${preview.isRemembered ? ' · a file with this header row was confirmed before' : ''}`}
    >
      <Notes title="Odd about this file" notes={oddities(preview)} />
      <Notes title="Still to be said" notes={needed} />
      <ColumnHeads
        preview={preview}
        answers={answers}
        onChoose={(at, column) => change(withColumn(answers, at, column))}
      />
      <div className="mt-5">
        <HowWritten preview={preview} answers={answers} onChange={change} />
      </div>
      <div className="mt-5 flex flex-wrap items-center gap-3">
        <Button isBusy={send.isPending} disabled={needed.length > 0} onClick={() => send.mutate(true)}>
          Try it without importing
        </Button>
        <Button
          look="primary"
          isBusy={send.isPending}
          disabled={needed.length > 0}
          onClick={() => send.mutate(false)}
        >
          Bring it in
        </Button>
        <span className="text-sm text-dim">
          It can be taken back afterwards, as long as nothing rests on its {KINDS[kind].one}s.
        </span>
      </div>
      {send.error && <Refused error={send.error} />}
      {send.data?.isDryRun && <Trial id={send.data.id} />}
    </Sheet>
  );
}

function Notes({ title, notes }: { title: string; notes: readonly string[] }) {
  if (notes.length === 0) return null;
  return (
    <div className="mb-4 border-l-2 border-brass py-1 pl-4">
      <p className="font-heading">{title}</p>
      <ul>
        {notes.map((note) => (
          <li key={note}>{note}</li>
        ))}
      </ul>
    </div>
  );
}

function Refused({ error }: { error: Error }) {
  const fields = error instanceof ApiError ? error.fields : [];
  return (
    <div role="alert" className="mt-4 border-l-2 border-oxide py-1 pl-4">
      <p className="font-heading">
        {error instanceof ApiError ? error.detail : 'That did not work. Try again.'}
      </p>
      <ul>
        {fields.map(({ path, message }) => (
          <li key={`${path} ${message}`}>{message}</li>
        ))}
      </ul>
    </div>
  );
}
