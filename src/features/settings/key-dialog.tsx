import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { Button } from '../../components/ui/button';
import { Dialog } from '../../components/ui/dialog';
import { Field } from '../../components/ui/field';
import { Checkbox, TextInput } from '../../components/ui/text-input';
import { notify } from '../../components/ui/toast-store';
import { lazyResolver, placeServerErrors } from '../../lib/form';
import { useChange } from '../../lib/use-change';
import { makeKey, type NewKey } from './queries';

const resolver = lazyResolver<NewKey>(() =>
  import('../../../shared/administration').then((schemas) => schemas.createApiKey),
);
const START: NewKey = { name: '', scopes: ['read'] };

type Props = { isOpen: boolean; onClose: () => void };

/** Makes a key, then shows it: this once. */
export function KeyDialog({ isOpen, onClose }: Props) {
  const [madeKey, setMadeKey] = useState<string | null>(null);
  const close = () => {
    setMadeKey(null);
    onClose();
  };
  return (
    <Dialog
      isOpen={isOpen}
      onClose={close}
      title={madeKey ? 'The key' : 'Make a key'}
      description={madeKey ? 'It is shown this once. Keep it where the program finds it.' : undefined}
    >
      {madeKey ? <MadeKey text={madeKey} /> : <KeyForm onMade={setMadeKey} />}
    </Dialog>
  );
}

function MadeKey({ text }: { text: string }) {
  return (
    <div className="flex flex-col gap-3">
      <code className="rounded-bench border border-rule bg-wash p-3 break-all select-all">{text}</code>
      <Button
        className="self-end"
        onClick={() =>
          navigator.clipboard.writeText(text).then(
            () => notify('The key is copied.'),
            () => notify('The browser does not let it be copied: mark it by hand.', 'failed'),
          )
        }
      >
        Copy
      </Button>
    </div>
  );
}

function KeyForm({ onMade }: { onMade: (key: string) => void }) {
  const form = useForm<NewKey>({ resolver, defaultValues: START });
  const [failure, setFailure] = useState<string | null>(null);
  const make = useChange(makeKey, { stale: ['keys'], isForm: true });
  const { errors } = form.formState;
  const submit = form.handleSubmit(async (values) => {
    try {
      onMade((await make.mutateAsync(values)).key);
    } catch (error) {
      setFailure(placeServerErrors<NewKey>(error, ['name', 'scopes'], form.setError));
    }
  });
  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-4">
      <Field label="Name" hint="Which program it is for." error={errors.name?.message}>
        {(control) => <TextInput {...control} autoComplete="off" {...form.register('name')} />}
      </Field>
      <fieldset className="flex flex-col">
        <legend className="text-table font-label">It may</legend>
        <Checkbox
          label="read figures (no customers, no technicians)"
          value="read"
          {...form.register('scopes')}
        />
        <Checkbox label="bring in records" value="import" {...form.register('scopes')} />
        {errors.scopes && (
          <p role="alert" className="text-sm text-oxide">
            Choose at least one.
          </p>
        )}
      </fieldset>
      {failure && (
        <p role="alert" className="text-oxide">
          {failure}
        </p>
      )}
      <Button type="submit" look="primary" className="self-end" isBusy={make.isPending}>
        Make the key
      </Button>
    </form>
  );
}
