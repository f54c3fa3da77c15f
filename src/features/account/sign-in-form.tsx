import { useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { Link, useNavigate, useSearchParams } from 'react-router';
import type { Session } from '../../../shared/session';
import { Button } from '../../components/ui/button';
import { Field } from '../../components/ui/field';
import { TextInput } from '../../components/ui/text-input';
import { apiSend } from '../../lib/api';
import { placeServerErrors } from '../../lib/form';
import { sessionQuery } from '../../lib/session';
import { paths, safeNext } from '../../paths';
import { FormError } from './door';

type Values = { email: string; password: string };

export function SignInForm() {
  const form = useForm<Values>({ defaultValues: { email: '', password: '' } });
  const [search] = useSearchParams();
  const [failure, setFailure] = useState<string | null>(null);
  const navigate = useNavigate();
  const client = useQueryClient();
  const { errors, isSubmitting } = form.formState;

  const submit = form.handleSubmit(async (values) => {
    setFailure(null);
    try {
      const session = await apiSend<Session>('POST', '/session', values);
      client.clear();
      client.setQueryData(sessionQuery.queryKey, session);
      await navigate(safeNext(search.get('next')), { replace: true });
    } catch (error) {
      setFailure(placeServerErrors<Values>(error, ['email', 'password'], form.setError));
    }
  });

  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-4">
      <FormError>{failure}</FormError>
      <Field label="E-mail" error={errors.email?.message}>
        {(control) => (
          <TextInput
            {...control}
            type="email"
            autoComplete="username"
            {...form.register('email', { required: 'Write your e-mail address.' })}
          />
        )}
      </Field>
      <Field label="Password" error={errors.password?.message}>
        {(control) => (
          <TextInput
            {...control}
            type="password"
            autoComplete="current-password"
            {...form.register('password', { required: 'Write your password.' })}
          />
        )}
      </Field>
      <div className="flex flex-wrap items-center justify-between gap-3">
        <Button type="submit" look="primary" isBusy={isSubmitting}>
          Sign in
        </Button>
        <Link to={paths.forgot()} className="inline-flex min-h-11 items-center text-table">
          Forgot the password
        </Link>
      </div>
    </form>
  );
}
