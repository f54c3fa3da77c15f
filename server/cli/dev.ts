import { spawn } from 'node:child_process';
import path from 'node:path';

/** The server, started again when its files change, and Vite's with reload in the browser; Ctrl-C ends both. */
const ROOT = path.resolve(import.meta.dirname, '../..');
const port = process.env['PORT'] ?? '4600';
const children = [
  spawn(process.execPath, [path.join(ROOT, 'node_modules/tsx/dist/cli.mjs'), 'watch', 'server/start.ts'], {
    cwd: ROOT,
    stdio: 'inherit',
    env: { ...process.env, PORT: port },
  }),
  spawn(process.execPath, [path.join(ROOT, 'node_modules/vite/bin/vite.js')], {
    cwd: ROOT,
    stdio: 'inherit',
  }),
];
for (const signal of ['SIGINT', 'SIGTERM'] as const) {
  process.on(signal, () => children.forEach((child) => child.kill(signal)));
}
const codes = await Promise.all(
  children.map((child) => new Promise<number>((resolve) => child.once('exit', (code) => resolve(code ?? 0)))),
);
process.exit(Math.max(...codes));
