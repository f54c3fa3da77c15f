import type { RequestHandler } from 'express';
import { mkdirSync } from 'node:fs';
import { rm } from 'node:fs/promises';
import multer, { MulterError } from 'multer';
import { invalid } from '../../http/errors';
import { arrivalFolder } from '../../imports/spool';

const LARGEST_FILE_BYTES = 1024 * 1024 * 1024;

/** Reads a form with one file straight to disk, whatever the order of its fields; nothing is left behind afterwards. */
export function receiveFile(dataDir: string): readonly RequestHandler[] {
  const folder = arrivalFolder(dataDir);
  const form = multer({
    storage: multer.diskStorage({
      destination: (_request, _file, done) => {
        mkdirSync(folder, { recursive: true });
        done(null, folder);
      },
    }),
    limits: { fileSize: LARGEST_FILE_BYTES, files: 1, fields: 10, fieldSize: 200_000, headerPairs: 50 },
    defParamCharset: 'utf8',
  }).single('file');
  const tidy: RequestHandler = (request, response, next) => {
    response.once('close', () => {
      // Taken files have moved on; one that was refused still lies where it arrived.
      if (request.file) rm(request.file.path, { force: true }).catch(() => undefined);
    });
    next();
  };
  const read: RequestHandler = (request, response, next) => {
    form(request, response, (error: unknown) => next(isMisshapen(error) ? misshapen(error) : error));
  };
  return [read, tidy];
}

/** What the parser says of a form that is cut off or has no boundary; faults of the disk bear a code. */
const isMisshapen = (error: unknown): error is Error =>
  error instanceof Error && !(error instanceof MulterError) && !('code' in error);
const misshapen = ({ message }: Error) => invalid(`The form cannot be read: ${message}.`);
