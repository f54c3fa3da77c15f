import type { ErrorRequestHandler, Request, Response } from 'express';
import { randomUUID } from 'node:crypto';
import { MulterError } from 'multer';
import type { Logger } from 'pino';
import type { z } from 'zod';
import { AppError, type ErrorKind, type FieldError } from './errors';

const KINDS: Record<ErrorKind, { status: number; title: string }> = {
  invalid: { status: 400, title: 'Not valid' },
  unauthenticated: { status: 401, title: 'Not signed in' },
  forbidden: { status: 403, title: 'Not allowed' },
  missing: { status: 404, title: 'Not found' },
  conflict: { status: 409, title: 'In conflict with what is there' },
  reused: { status: 422, title: 'Key used for other content' },
  tooLarge: { status: 413, title: 'Too large' },
  tooMany: { status: 429, title: 'Too many tries' },
  unsupported: { status: 415, title: 'Not a format that is read here' },
};

type Problem = {
  status: number;
  title: string;
  detail: string;
  errors?: readonly FieldError[];
  instance?: string;
};

/** Answers with an RFC 9457 problem. */
export function sendProblem(response: Response, problem: Problem): void {
  const { status, title, detail, errors, instance } = problem;
  response
    .status(status)
    .type('application/problem+json')
    .send(
      JSON.stringify({
        type: 'about:blank',
        title,
        status,
        detail,
        ...(instance ? { instance } : {}),
        ...(errors && errors.length > 0 ? { errors } : {}),
      }),
    );
}

export const jsonPointer = (path: readonly PropertyKey[]) =>
  path.map((step) => `/${String(step).replaceAll('~', '~0').replaceAll('/', '~1')}`).join('');

export function fieldErrors(error: z.ZodError): FieldError[] {
  return error.issues.flatMap((issue) =>
    issue.code === 'unrecognized_keys'
      ? issue.keys.map((key) => ({
          path: jsonPointer([...issue.path, key]),
          message: 'This field is not known.',
        }))
      : [{ path: jsonPointer(issue.path), message: issue.message }],
  );
}

/** Parses input against a schema; every issue is reported. */
export function parseInput<Schema extends z.ZodType>(
  schema: Schema,
  input: unknown,
  where: string,
): z.output<Schema> {
  const result = schema.safeParse(input);
  if (result.success) return result.data;
  throw new AppError('invalid', `The ${where} cannot be used as sent.`, fieldErrors(result.error));
}

/** The one place where errors become answers; an unknown one gets fixed text and an id that is in the log. */
export function problemHandler(logger: Logger): ErrorRequestHandler {
  return (error: unknown, request: Request, response: Response, next) => {
    if (response.headersSent) return next(error);
    const known = toProblem(error);
    if (known) return sendProblem(response, known);
    const id = randomUUID();
    logger.error({ err: error, errorId: id, method: request.method, path: request.path }, 'unexpected error');
    sendProblem(response, {
      status: 500,
      title: 'Something went wrong here',
      detail: `Nothing was changed. Tell whoever runs this program the number ${id}.`,
      instance: `urn:uuid:${id}`,
    });
  };
}

function toProblem(error: unknown): Problem | undefined {
  if (error instanceof AppError) return { ...KINDS[error.kind], detail: error.message, errors: error.errors };
  if (error instanceof MulterError) {
    return error.code === 'LIMIT_FILE_SIZE'
      ? { ...KINDS.tooLarge, detail: 'The file is larger than this server takes.' }
      : { ...KINDS.invalid, detail: `The form cannot be read: ${error.message}.` };
  }
  if (!(error instanceof Error)) return undefined;
  const sqlState = sqlStateOf(error);
  if (sqlState === '23505') return { ...KINDS.conflict, detail: 'There is one like this already.' };
  if (sqlState === '22021' || sqlState === '22P05')
    return { ...KINDS.invalid, detail: 'A text holds a NUL or half a character, which nothing here does.' };
  if (sqlState === '23503') return { ...KINDS.conflict, detail: 'Something else still refers to it.' };
  if ('status' in error && typeof error.status === 'number' && error.status >= 400 && error.status < 500) {
    return bodyProblem(error.status);
  }
  return undefined;
}

/** Errors of the body parsers, which carry an HTTP status of their own. */
function bodyProblem(status: number): Problem {
  if (status === 413) return { ...KINDS.tooLarge, detail: 'The body is larger than this route takes.' };
  if (status === 415) return { ...KINDS.unsupported, detail: 'Send JSON in UTF-8.' };
  return { status, title: 'Not valid', detail: 'The request cannot be read: it is not well formed.' };
}

/** Drizzle wraps the driver's error: the SQLSTATE is on its cause. */
export function sqlStateOf(error: Error): string | undefined {
  for (let step: unknown = error; step instanceof Error; step = step.cause) {
    if ('code' in step && typeof step.code === 'string' && /^[0-9A-Z]{5}$/.test(step.code)) return step.code;
  }
  return undefined;
}
