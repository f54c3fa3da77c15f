import { useState } from 'react';
import { Controller, useForm } from 'react-hook-form';
import { ROLE_NAMES, ROLES } from '../../../shared/roles';
import { Button } from '../../components/ui/button';
import { Dialog } from '../../components/ui/dialog';
import { Field } from '../../components/ui/field';
import { Select } from '../../components/ui/select';
import { TextInput } from '../../components/ui/text-input';
import { lazyResolver, placeServerErrors } from '../../lib/form';
import { useChange } from '../../lib/use-change';
import { invite, type Invitation } from './queries';

const resolver = lazyResolver<Invitation>(() =>
  import('../../../shared/administration').then((schemas) => schemas.inviteMember),
);
const START: Invitation = { email: '', displayName: '', role: 'technician' };
const ROLE_CHOICES = ROLES.map((role) => ({ value: role, label: ROLE_NAMES[role] }));

type Props = { isOpen: boolean; onClose: () => void };

export function InviteDialog({ isOpen, onClose }: Props) {
  const form = useForm<Invitation>({ resolver, defaultValues: START });
  const [failure, setFailure] = useState<string | null>(null);
  const send = useChange(invite, { stale: ['people'], said: 'The invitation is on its way.', isForm: true });
  const { errors } = form.formState;
  const close = () => {
    form.reset(START);
    setFailure(null);
    onClose();
  };
  const submit = form.handleSubmit(async (values) => {
    try {
      await send.mutateAsync(values);
      close();
    } catch (error) {
      setFailure(placeServerErrors<Invitation>(error, ['email', 'displayName', 'role'], form.setError));
    }
  });
  return (
    <Dialog
      isOpen={isOpen}
      onClose={close}
      title="Invite someone"
      description="They get a link by e-mail to set their password."
    >
      <form onSubmit={submit} noValidate className="flex flex-col gap-4">
        <Field label="Name" error={errors.displayName?.message}>
          {(control) => <TextInput {...control} autoComplete="off" {...form.register('displayName')} />}
        </Field>
        <Field label="E-mail" error={errors.email?.message}>
          {(control) => (
            <TextInput {...control} type="email" autoComplete="off" {...form.register('email')} />
          )}
        </Field>
        <Field label="Role" error={errors.role?.message}>
          {(control) => (
            <Controller
              control={form.control}
              name="role"
              render={({ field }) => (
                <Select {...control} value={field.value} onChange={field.onChange} options={ROLE_CHOICES} />
              )}
            />
          )}
        </Field>
        {failure && (
          <p role="alert" className="text-oxide">
            {failure}
          </p>
        )}
        <Button type="submit" look="primary" className="self-end" isBusy={send.isPending}>
          Send the invitation
        </Button>
      </form>
    </Dialog>
  );
}
