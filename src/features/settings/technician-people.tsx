import { useState } from 'react';
import { useForm } from 'react-hook-form';
import type { Technician } from '../../../shared/administration';
import { Button } from '../../components/ui/button';
import { DataTable, type Column } from '../../components/ui/data-table';
import { Dialog } from '../../components/ui/dialog';
import { Field } from '../../components/ui/field';
import { Sheet } from '../../components/ui/sheet';
import { TextInput } from '../../components/ui/text-input';
import { lazyResolver, placeServerErrors } from '../../lib/form';
import { useFormats } from '../../lib/session';
import { useChange } from '../../lib/use-change';
import { saveTechnician } from './queries';

type Values = { displayName: string; leftOn: string | null };

const resolver = lazyResolver<Values>(() =>
  import('../../../shared/administration').then((schemas) =>
    schemas.changeTechnician.pick({ displayName: true, leftOn: true }).required(),
  ),
);

/** The people behind the spellings. */
export function TechnicianPeople({ technicians }: { technicians: readonly Technician[] }) {
  const formats = useFormats();
  const [edited, setEdited] = useState<Technician | null>(null);
  const columns: Column<Technician>[] = [
    { id: 'name', header: 'Name', value: (row) => row.displayName, isRowHeader: true },
    {
      id: 'repairs',
      header: 'Repairs',
      value: repairsOf,
      cell: (row) => formats.count(repairsOf(row)),
      align: 'right',
    },
    { id: 'left', header: 'Left on', value: (row) => row.leftOn, cell: (row) => formats.day(row.leftOn) },
    {
      id: 'change',
      header: 'Change',
      value: () => null,
      isSortable: false,
      cell: (row) => (
        <Button look="text" aria-label={`Change ${row.displayName}`} onClick={() => setEdited(row)}>
          Change
        </Button>
      ),
    },
  ];
  return (
    <Sheet title="Who they are">
      <DataTable caption="Technicians" rows={technicians} columns={columns} rowId={(row) => row.id} />
      {edited && <EditDialog technician={edited} onClose={() => setEdited(null)} />}
    </Sheet>
  );
}

const repairsOf = ({ spellings }: Technician) => spellings.reduce((sum, { repairs }) => sum + repairs, 0);

function EditDialog({ technician, onClose }: { technician: Technician; onClose: () => void }) {
  const { displayName, leftOn } = technician;
  const form = useForm<Values>({ resolver, defaultValues: { displayName, leftOn } });
  const [failure, setFailure] = useState<string | null>(null);
  const save = useChange(saveTechnician, { stale: ['technicians'], said: 'Saved.', isForm: true });
  const { errors } = form.formState;
  const submit = form.handleSubmit(async (values) => {
    try {
      await save.mutateAsync({ id: technician.id, ...values });
      onClose();
    } catch (error) {
      setFailure(placeServerErrors<Values>(error, ['displayName', 'leftOn'], form.setError));
    }
  });
  return (
    <Dialog isOpen onClose={onClose} title={displayName}>
      <form onSubmit={submit} noValidate className="flex flex-col gap-4">
        <Field label="Name" error={errors.displayName?.message}>
          {(control) => <TextInput {...control} {...form.register('displayName')} />}
        </Field>
        <Field label="Left on" hint="Empty while they work here." error={errors.leftOn?.message}>
          {(control) => (
            <TextInput
              {...control}
              type="date"
              {...form.register('leftOn', { setValueAs: (value: unknown) => (value === '' ? null : value) })}
            />
          )}
        </Field>
        {failure && (
          <p role="alert" className="text-oxide">
            {failure}
          </p>
        )}
        <Button type="submit" look="primary" className="self-end" isBusy={save.isPending}>
          Save
        </Button>
      </form>
    </Dialog>
  );
}
