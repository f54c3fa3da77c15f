import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { Button } from '../../components/ui/button';
import { Dialog } from '../../components/ui/dialog';
import { Field } from '../../components/ui/field';
import { Skeleton } from '../../components/ui/skeleton';
import { Checkbox, TextInput } from '../../components/ui/text-input';
import { lazyResolver, placeServerErrors } from '../../lib/form';
import { useChange } from '../../lib/use-change';
import { modelChoicesQuery, saveFamilyAs, type Family, type FamilyDraft } from './queries';

const resolver = lazyResolver<FamilyDraft>(() =>
  import('../../../shared/administration').then((schemas) => schemas.saveFamily),
);

type Props = { family: Family | null; onClose: () => void };

export function FamilyDialog({ family, onClose }: Props) {
  const models = useQuery(modelChoicesQuery);
  const [words, setWords] = useState('');
  const [failure, setFailure] = useState<string | null>(null);
  const form = useForm<FamilyDraft>({
    resolver,
    defaultValues: { name: family?.name ?? '', modelIds: family?.models.map(({ id }) => id) ?? [] },
  });
  const save = useChange(saveFamilyAs, { stale: ['families'], said: 'Saved.', isForm: true });
  const { errors } = form.formState;
  const submit = form.handleSubmit(async (values) => {
    try {
      await save.mutateAsync({ id: family?.id ?? null, ...values });
      onClose();
    } catch (error) {
      setFailure(placeServerErrors<FamilyDraft>(error, ['name', 'modelIds'], form.setError));
    }
  });
  const isShown = (name: string) => name.toLowerCase().includes(words.trim().toLowerCase());
  return (
    <Dialog isOpen onClose={onClose} title={family ? family.name : 'Make a family'}>
      <form onSubmit={submit} noValidate className="flex flex-col gap-4">
        <Field label="Name" hint="What they share, such as “42-inch deck”." error={errors.name?.message}>
          {(control) => <TextInput {...control} autoComplete="off" {...form.register('name')} />}
        </Field>
        <Field label="Narrow the models down">
          {(control) => (
            <TextInput
              {...control}
              type="search"
              value={words}
              onChange={(event) => setWords(event.target.value)}
            />
          )}
        </Field>
        <fieldset className="max-h-64 overflow-y-auto rounded-bench border border-rule px-3 py-1">
          <legend className="sr-only">Models</legend>
          {models.isPending && <Skeleton className="my-2 h-24" />}
          {models.error && <p className="text-oxide">{models.error.message}</p>}
          {models.data?.data.map((model) => {
            const name = `${model.maker} ${model.model}`;
            return (
              // Hidden rather than left out: what is ticked stays ticked.
              <div key={model.id} hidden={!isShown(name)}>
                <Checkbox label={name} value={model.id} {...form.register('modelIds')} />
              </div>
            );
          })}
        </fieldset>
        {(failure ?? errors.modelIds) && (
          <p role="alert" className="text-oxide">
            {failure ?? 'These models cannot be saved.'}
          </p>
        )}
        <Button
          type="submit"
          look="primary"
          className="self-end"
          disabled={!models.data}
          isBusy={save.isPending}
        >
          Save
        </Button>
      </form>
    </Dialog>
  );
}
