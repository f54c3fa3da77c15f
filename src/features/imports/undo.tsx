import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Link } from 'react-router';
import type { ImportState } from '../../../shared/imports';
import { Button } from '../../components/ui/button';
import { ConfirmDialog } from '../../components/ui/confirm-dialog';
import { notify } from '../../components/ui/toast-store';
import { ApiError, type FieldError } from '../../lib/api';
import { paths } from '../../paths';
import { KINDS, nameOf } from './import-words';
import { undoImport } from './queries';

/** The way back; where something rests on the import since, it says on what, and all stays. */
export function Undo({ state }: { state: ImportState }) {
  const [isAsking, setAsking] = useState(false);
  const client = useQueryClient();
  const undo = useMutation({
    mutationFn: () => undoImport(state.id),
    onSuccess: async () => {
      await client.invalidateQueries();
      notify(`${nameOf(state)} is taken back.`);
    },
    onSettled: () => setAsking(false),
  });
  const { one } = KINDS[state.kind];
  return (
    <>
      {undo.error && <Conflicts error={undo.error} />}
      <div>
        <Button look="danger" onClick={() => setAsking(true)}>
          Take this import back
        </Button>
      </div>
      <ConfirmDialog
        isOpen={isAsking}
        onClose={() => setAsking(false)}
        title={`Take ${nameOf(state)} back?`}
        confirm="Take it back"
        isBusy={undo.isPending}
        onConfirm={() => undo.mutate()}
      >
        What it made goes, and every {one} that it changed is as it was before. The figures follow. What came
        in by other imports stays.
      </ConfirmDialog>
    </>
  );
}

function Conflicts({ error }: { error: Error }) {
  const fields = error instanceof ApiError ? error.fields : [];
  return (
    <div role="alert" className="max-w-[44rem] border-l-2 border-oxide py-1 pl-4">
      <p className="font-heading">
        {error instanceof ApiError ? error.detail : 'That did not work. Try again.'}
      </p>
      <ul className="mt-1 max-h-72 overflow-y-auto" tabIndex={fields.length > 8 ? 0 : undefined}>
        {fields.map((field) => (
          <li key={`${field.path} ${field.message}`}>
            <Touched field={field} />
          </li>
        ))}
      </ul>
    </div>
  );
}

/** The server names what is touched by its table and id. */
function Touched({ field: { path, message } }: { field: FieldError }) {
  const [, table, id] = path.split('/');
  if (id && table === 'repairs') return <Link to={paths.repair(id)}>{message}</Link>;
  if (id && table === 'units') return <Link to={paths.unit(id)}>{message}</Link>;
  return message;
}
