import { spawn } from 'node:child_process';
import { rmSync } from 'node:fs';
import { createServer } from 'node:net';
import path from 'node:path';
import type { TestProject } from 'vitest/node';
import { scratchFolder } from '../scratch-folder';

declare module 'vitest' {
  export interface ProvidedContext {
    /** Where the application of the browser tests is, with the demo shop of a fixed day. */
    address: string;
  }
}

const ROOT = path.resolve(import.meta.dirname, '../..');
const DEMO_DAY = '2026-06-30';

/** The application as `npm start` brings it up, in a data folder of its own, stopped as Ctrl-C would. */
export default async function setup(project: TestProject) {
  const dataDir = scratchFolder('e2e');
  const port = await freePort();
  const server = spawn(process.execPath, ['--import', 'tsx', 'server/start.ts'], {
    cwd: ROOT,
    stdio: ['ignore', 'pipe', 'inherit'],
    env: {
      ...process.env,
      NODE_ENV: 'development',
      PORT: String(port),
      DATA_DIR: dataDir,
      DEMO_DAY,
      LOG_LEVEL: 'error',
    },
  });
  const ended = new Promise<void>((resolve) => server.once('exit', () => resolve()));
  await new Promise<void>((resolve, reject) => {
    let said = '';
    server.stdout.on('data', (piece: Buffer) => {
      said += piece.toString();
      if (said.includes('Ctrl-C stops it.')) resolve();
    });
    server.once('exit', (code) => reject(new Error(`the application ended (${code}):\n${said}`)));
  });
  project.provide('address', `http://127.0.0.1:${port}`);
  return async () => {
    server.kill('SIGINT');
    await ended;
    rmSync(dataDir, { recursive: true, force: true });
  };
}

function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const probe = createServer().once('error', reject);
    probe.listen(0, '127.0.0.1', () => {
      const address = probe.address();
      probe.close(() =>
        address && typeof address === 'object' ? resolve(address.port) : reject(new Error('no port')),
      );
    });
  });
}
