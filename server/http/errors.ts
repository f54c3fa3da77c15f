/** What services throw; they know nothing of HTTP. `problem.ts` alone maps them. */
export type FieldError = { path: string; message: string };

export type ErrorKind =
  | 'invalid'
  | 'unauthenticated'
  | 'forbidden'
  | 'missing'
  | 'conflict'
  | 'reused'
  | 'tooLarge'
  | 'tooMany'
  | 'unsupported';

export class AppError extends Error {
  constructor(
    readonly kind: ErrorKind,
    message: string,
    readonly errors: readonly FieldError[] = [],
  ) {
    super(message);
  }
}

export const invalid = (detail: string, errors: readonly FieldError[] = []) =>
  new AppError('invalid', detail, errors);
export const missing = (what: string) => new AppError('missing', `There is no such ${what}.`);
export const conflict = (detail: string, errors: readonly FieldError[] = []) =>
  new AppError('conflict', detail, errors);
export const forbidden = (detail = 'Your role does not allow this.') => new AppError('forbidden', detail);
