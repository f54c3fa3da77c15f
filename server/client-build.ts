import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import path from 'node:path';

const ROOT = path.resolve(import.meta.dirname, '..');
const SOURCES = ['src', 'shared', 'analytics', 'index.html', 'vite.config.ts', 'package-lock.json'];
const STAMP = path.join(ROOT, 'dist/client/.stamp');

/** Builds the client where what it is made from has changed since it was last built. */
export async function buildClientIfStale(say: (line: string) => void): Promise<void> {
  const stamp = sourceStamp();
  if (existsSync(STAMP) && readFileSync(STAMP, 'utf8') === stamp) return;
  say('Building the client');
  const { build } = await import('vite');
  await build({ root: ROOT, logLevel: 'error' });
  writeFileSync(STAMP, stamp);
}

function sourceStamp(): string {
  const hash = createHash('sha256');
  for (const source of SOURCES) {
    for (const file of filesBelow(path.join(ROOT, source))) {
      const { size, mtimeMs } = statSync(file);
      hash.update(`${path.relative(ROOT, file)}:${size}:${mtimeMs}\n`);
    }
  }
  return hash.digest('hex');
}

function filesBelow(target: string): string[] {
  if (!statSync(target).isDirectory()) return [target];
  return readdirSync(target, { withFileTypes: true })
    .flatMap((entry) => filesBelow(path.join(target, entry.name)))
    .sort();
}
