import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import path from 'node:path';

const ROOT = path.resolve(import.meta.dirname, '..');
const VITE = path.join(ROOT, 'node_modules/vite/bin/vite.js');
const SOURCES = ['src', 'shared', 'analytics', 'index.html', 'vite.config.ts', 'package-lock.json'];
const STAMP = path.join(ROOT, 'dist/client/.stamp');

/** Builds the client where what it is made from has changed since it was last built. */
export function buildClientIfStale(say: (line: string) => void): void {
  const stamp = sourceStamp();
  if (existsSync(STAMP) && readFileSync(STAMP, 'utf8') === stamp) return;
  say('Building the client');
  // In a process of its own, so that a server does not keep the bundler's memory.
  const { status } = spawnSync(process.execPath, [VITE, 'build', '--logLevel', 'error'], {
    cwd: ROOT,
    env: { ...process.env, NODE_ENV: 'production' },
    stdio: ['ignore', 'ignore', 'inherit'],
  });
  if (status !== 0) throw new Error('The client could not be built: see above.');
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
