import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { Link } from 'react-router';
import { Button } from '../../components/ui/button';
import { Field } from '../../components/ui/field';
import { TextInput } from '../../components/ui/text-input';
import { apiSend } from '../../lib/api';
import { lazyResolver, placeServerErrors } from '../../lib/form';
import { paths } from '../../paths';
import { FormError } from './door';

type Values = { email: string };

const resolver = lazyResolver<Values>(() =>
  import('../../../shared/session').then((schemas) => schemas.askReset),
);

export function ForgotForm() {
  const form = useForm<Values>({ resolver, defaultValues: { email: '' } });
  const [sentTo, setSentTo] = useState<string | null>(null);
  const [failure, setFailure] = useState<string | null>(null);
  const { errors, isSubmitting } = form.formState;

  const submit = form.handleSubmit(async (values) => {
    setFailure(null);
    try {
      await apiSend('POST', '/password/forgot', values);
      setSentTo(values.email);
    } catch (error) {
      setFailure(placeServerErrors<Values>(error, ['email'], form.setError));
    }
  });

  if (sentTo !== null) {
    return (
      <div role="status" className="flex flex-col gap-3">
        <p>
          If {sentTo} belongs to someone here, a message with a link is on its way. The link works once and
          not for long.
        </p>
        <Link to={paths.signIn()}>Back to sign in</Link>
      </div>
    );
  }
  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-4">
      <FormError>{failure}</FormError>
      <Field label="E-mail" error={errors.email?.message}>
        {(control) => (
          <TextInput {...control} type="email" autoComplete="username" {...form.register('email')} />
        )}
      </Field>
      <div className="flex flex-wrap items-center justify-between gap-3">
        <Button type="submit" look="primary" isBusy={isSubmitting}>
          Send the link
        </Button>
        <Link to={paths.signIn()} className="inline-flex min-h-11 items-center text-table">
          Back to sign in
        </Link>
      </div>
    </form>
  );
}
