import { chmodSync, mkdtempSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';

/** A new folder under the system's temporary one, which the database's user can pass as well. */
export function scratchFolder(purpose: string): string {
  const folder = mkdtempSync(path.join(os.tmpdir(), `witness-mark-${purpose}-`));
  chmodSync(folder, 0o755);
  return folder;
}
