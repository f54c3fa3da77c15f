import { z } from 'zod';
import {
  IMPORT_KINDS,
  mapping as mappingSchema,
  rejection,
  type createImportForm,
  type FilePreview,
  type ImportKind,
  type ImportState,
  type Mapping,
} from '../../../shared/imports';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import type { Actor } from '../../http/actor';
import { audit } from '../../http/audit';
import { decodeCursor, pageOf } from '../../http/cursor';
import { invalid, missing } from '../../http/errors';
import { parseInput } from '../../http/problem';
import { createImport } from '../../imports/create-import';
import { presentImport, readImport } from '../../imports/import-state';
import { previewFile } from '../../imports/preview-file';
import { findSpooled, removeSpooled, spoolUpload, sweepSpools, type Spooled } from '../../imports/spool';
import { hasImport, listImportRows, listRejectionRows } from './queries';

export type Upload = { path: string; originalname: string; size: number };
type Page = { limit: number; cursor?: string | undefined };

export async function listImports(deps: Deps, { shopId }: Actor, { limit, cursor }: Page) {
  const after = decodeCursor(cursor, z.tuple([z.iso.datetime(), z.uuid()]));
  const rows = await withShop(deps.database, shopId, (tx) => listImportRows(tx, limit, after));
  const page = pageOf(rows, limit, (row) => [row.createdKey, row.id]);
  return { ...page, data: page.data.map(presentImport) };
}

export async function listRejections(
  deps: Deps,
  { shopId }: Actor,
  importId: string,
  { limit, cursor }: Page,
) {
  const [after = 0] = decodeCursor(cursor, z.tuple([z.number().int()])) ?? [];
  const rows = await withShop(deps.database, shopId, async (tx) => {
    if (!(await hasImport(tx, importId))) throw missing('import');
    return listRejectionRows(tx, importId, limit, after);
  });
  const page = pageOf(rows, limit, (row) => [row.ordinal]);
  return {
    ...page,
    data: page.data.map(({ line, repairNumber, errors }) => rejection.parse({ line, repairNumber, errors })),
  };
}

/** Keeps an uploaded file and says what it seems to be. */
export async function previewUpload(
  deps: Deps,
  { shopId }: Actor,
  upload: Upload,
  kind: string,
): Promise<FilePreview> {
  await sweepSpools(deps.config.dataDir, deps.now());
  const spooled = await spoolUpload(deps.config.dataDir, shopId, upload);
  return keptIfDone(spooled, () => previewFile(deps, shopId, requireKind(kind), spooled));
}

/** Makes an import of an uploaded file, or of one that was looked at before, and puts it in the queue. */
export async function startImport(
  deps: Deps,
  actor: Actor,
  upload: Upload | undefined,
  form: z.output<typeof createImportForm>,
): Promise<ImportState> {
  const { shopId } = actor;
  const kind = requireKind(form.kind);
  const mapping = readMapping(form.mapping);
  const spooled = await findFile(deps, shopId, upload, form.spoolId);
  const create = () =>
    createImport(
      deps,
      {
        shopId,
        kind,
        spooled,
        mapping,
        isDryRun: form.dryRun === 'true',
        source: 'file',
        userId: actor.kind === 'user' ? actor.userId : undefined,
      },
      async (tx, importId) => {
        await audit(tx, actor, {
          action: 'import',
          subject: 'import',
          subjectId: importId,
          detail: { kind, dryRun: form.dryRun === 'true' },
        });
        await deps.jobs.send(tx, 'import', { shopId, importId });
      },
    );
  // A file that was looked at stays for another try; one that came with the form is sent again.
  const importId = await (upload ? keptIfDone(spooled, create) : create());
  deps.jobs.wake('import');
  return readImport(deps.database, shopId, importId);
}

async function findFile(
  deps: Deps,
  shopId: string,
  upload: Upload | undefined,
  spoolId: string | undefined,
): Promise<Spooled> {
  const { dataDir } = deps.config;
  if (upload && !spoolId) return spoolUpload(dataDir, shopId, upload);
  if (!upload && spoolId) return findSpooled(dataDir, shopId, spoolId);
  throw invalid('Send one file.', [
    { path: '/file', message: 'Send the file as “file”, or the spoolId of its preview.' },
  ]);
}

async function keptIfDone<Result>(spooled: Spooled, work: () => Promise<Result>): Promise<Result> {
  try {
    return await work();
  } catch (error) {
    await removeSpooled(spooled.filePath);
    throw error;
  }
}

function requireKind(kind: string): ImportKind {
  const known = IMPORT_KINDS.find((one) => one === kind);
  if (known) return known;
  const message =
    kind === 'terms' || kind === 'credits'
      ? `Files of ${kind} cannot be imported yet.`
      : `Say one of: ${IMPORT_KINDS.join(', ')}.`;
  throw invalid('This kind of file cannot be imported.', [{ path: '/kind', message }]);
}

function readMapping(text: string | undefined): Mapping | undefined {
  if (text === undefined || text.trim() === '') return undefined;
  try {
    return parseInput(mappingSchema, JSON.parse(text), 'mapping');
  } catch (error) {
    if (error instanceof SyntaxError)
      throw invalid('The mapping is not JSON.', [{ path: '/mapping', message: 'Send a JSON object.' }]);
    throw error;
  }
}
