import type { FieldValues, Path, Resolver, UseFormSetError } from 'react-hook-form';
import type { z } from 'zod';
import { ApiError } from './api';
import { plainError } from './plain-errors';

/**
 * Checks a form against a schema of `shared`, which is fetched at the first check: zod stays out of the first load.
 * Without compiled checks, since the content policy forbids evaluated code.
 */
export function lazyResolver<Values extends FieldValues>(
  load: () => Promise<z.ZodType<unknown, Values>>,
): Resolver<Values> {
  return async (values, context, options) => {
    const [{ config }, { zodResolver }] = await Promise.all([
      import('zod'),
      import('@hookform/resolvers/zod'),
    ]);
    config({ jitless: true, customError: plainError });
    const schema = (await load()) as z.ZodType<FieldValues, FieldValues>;
    return (zodResolver(schema) as unknown as Resolver<Values>)(values, context, options);
  };
}

/**
 * Puts what the server refused beside its fields; gives back what belongs to none of them.
 * @returns a message for the whole form, or null where each error has found its field.
 */
export function placeServerErrors<Values extends FieldValues>(
  error: unknown,
  names: readonly Path<Values>[],
  setError: UseFormSetError<Values>,
): string | null {
  if (!(error instanceof ApiError)) return 'That did not work. Try again.';
  const known = new Map<string, Path<Values>>(names.map((name) => [`/${name.replaceAll('.', '/')}`, name]));
  const left = error.fields.filter((field) => {
    const name = known.get(field.path);
    if (name) setError(name, { type: 'server', message: field.message });
    return !name;
  });
  if (left.length > 0) return left.map((field) => field.message).join(' ');
  return error.fields.length > 0 ? null : error.detail;
}
