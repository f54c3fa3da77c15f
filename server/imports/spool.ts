import { randomUUID } from 'node:crypto';
import { createReadStream, createWriteStream } from 'node:fs';
import { mkdir, readdir, readFile, rename, rm, stat, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { pipeline } from 'node:stream/promises';
import { z } from 'zod';
import { missing } from '../http/errors';

/** A file that came in, under a name that the server made. */
export type Spooled = { spoolId: string; filePath: string; fileName: string; bytes: number };

const KEPT_HOURS = 48;
const note = z.object({ fileName: z.string() });

/** Where uploads land before it is known what they are. */
export const arrivalFolder = (dataDir: string): string => path.join(dataDir, 'uploads', 'arriving');
const shopFolder = (dataDir: string, shopId: string): string =>
  path.join(dataDir, 'uploads', z.uuid().parse(shopId));

/** Puts an uploaded file among its shop's; the name it came with is kept beside it, never used as a path. */
export async function spoolUpload(
  dataDir: string,
  shopId: string,
  upload: { path: string; originalname: string; size: number },
): Promise<Spooled> {
  const place = await makePlace(dataDir, shopId, upload.originalname);
  await rename(upload.path, place.filePath);
  return { ...place, bytes: upload.size };
}

/** Copies a file of this machine among the shop's. */
export async function spoolFile(
  dataDir: string,
  shopId: string,
  filePath: string,
  fileName: string,
): Promise<Spooled> {
  const place = await makePlace(dataDir, shopId, fileName);
  await pipeline(createReadStream(filePath), createWriteStream(place.filePath));
  return { ...place, bytes: (await stat(place.filePath)).size };
}

async function makePlace(dataDir: string, shopId: string, name: string) {
  const folder = shopFolder(dataDir, shopId);
  await mkdir(folder, { recursive: true });
  const spoolId = randomUUID();
  const fileName =
    path
      .basename(name.replaceAll('\\', '/'))
      .replace(/\p{Cc}/gu, '')
      .slice(0, 200) || 'file';
  const filePath = path.join(folder, spoolId);
  await writeFile(`${filePath}.json`, JSON.stringify({ fileName }));
  return { spoolId, filePath, fileName };
}

/** @throws missing where this shop has no such file. */
export async function findSpooled(dataDir: string, shopId: string, spoolId: string): Promise<Spooled> {
  const filePath = path.join(shopFolder(dataDir, shopId), z.uuid().parse(spoolId));
  try {
    const { fileName } = note.parse(JSON.parse(await readFile(`${filePath}.json`, 'utf8')));
    return { spoolId, filePath, fileName, bytes: (await stat(filePath)).size };
  } catch {
    throw missing('uploaded file; it may have been kept too long');
  }
}

export async function removeSpooled(filePath: string): Promise<void> {
  await Promise.all([rm(filePath, { force: true }), rm(`${filePath}.json`, { force: true })]);
}

/** Removes what was uploaded and never used. */
export async function sweepSpools(dataDir: string, now: Date): Promise<void> {
  const root = path.join(dataDir, 'uploads');
  const names = await readdir(root, { recursive: true }).catch(() => []);
  for (const name of names) {
    const file = path.join(root, name);
    const found = await stat(file).catch(() => undefined);
    const isOld = found?.isFile() && now.getTime() - found.mtimeMs > KEPT_HOURS * 3_600_000;
    if (isOld) await rm(file, { force: true });
  }
}
