import path from 'node:path';
import type { ImportKind, ImportState, Mapping } from '../../shared/imports';
import type { Deps } from '../deps';
import { createImport } from './create-import';
import { readImport } from './import-state';
import { runImport } from './run-import';
import { removeSpooled, spoolFile } from './spool';

/**
 * Imports a file of this machine in this process, to its end.
 * @throws invalid where it cannot be begun; what goes wrong later is in the state.
 */
export async function importFile(
  deps: Deps,
  file: {
    shopId: string;
    kind: ImportKind;
    filePath: string;
    fileName?: string;
    mapping?: Mapping;
    dryRun?: boolean;
    source: 'file' | 'shell';
    userId?: string;
  },
): Promise<ImportState> {
  const { shopId, kind, filePath, mapping, source, userId } = file;
  const spooled = await spoolFile(
    deps.config.dataDir,
    shopId,
    filePath,
    file.fileName ?? path.basename(filePath),
  );
  let importId: string;
  try {
    importId = await createImport(deps, {
      shopId,
      kind,
      spooled,
      mapping,
      source,
      userId,
      isDryRun: file.dryRun ?? false,
    });
  } catch (error) {
    await removeSpooled(spooled.filePath);
    throw error;
  }
  await runImport(deps, { shopId, importId });
  return readImport(deps.database, shopId, importId);
}
