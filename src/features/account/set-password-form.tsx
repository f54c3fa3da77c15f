import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { Link, useNavigate, useSearchParams } from 'react-router';
import { Button } from '../../components/ui/button';
import { Field } from '../../components/ui/field';
import { EmptyState } from '../../components/ui/states';
import { TextInput } from '../../components/ui/text-input';
import { notify } from '../../components/ui/toast-store';
import { apiSend } from '../../lib/api';
import { lazyResolver, placeServerErrors } from '../../lib/form';
import { paths } from '../../paths';
import { FormError } from './door';

type Values = { token: string; password: string };

const resolver = lazyResolver<Values>(() =>
  import('../../../shared/session').then((schemas) => schemas.setPassword),
);

export function SetPasswordForm() {
  const [search] = useSearchParams();
  const token = search.get('token') ?? '';
  const form = useForm<Values>({ resolver, defaultValues: { token, password: '' } });
  const [failure, setFailure] = useState<string | null>(null);
  const navigate = useNavigate();
  const { errors, isSubmitting } = form.formState;

  if (token === '') {
    return (
      <EmptyState title="This link is not whole." action={<Link to={paths.forgot()}>Ask for a new one</Link>}>
        Open it straight from the message, or copy all of it.
      </EmptyState>
    );
  }
  const submit = form.handleSubmit(async (values) => {
    setFailure(null);
    try {
      await apiSend('POST', '/password/set', values);
      notify('Your password is set. Sign in with it.');
      await navigate(paths.signIn(), { replace: true });
    } catch (error) {
      setFailure(placeServerErrors<Values>(error, ['password'], form.setError));
    }
  });
  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-4">
      <FormError>{failure ?? errors.token?.message}</FormError>
      {failure && <Link to={paths.forgot()}>Ask for a new link</Link>}
      <Field label="New password" hint="At least 12 characters." error={errors.password?.message}>
        {(control) => (
          <TextInput
            {...control}
            type="password"
            autoComplete="new-password"
            {...form.register('password')}
          />
        )}
      </Field>
      <Button type="submit" look="primary" isBusy={isSubmitting} className="self-start">
        Set the password
      </Button>
    </form>
  );
}
