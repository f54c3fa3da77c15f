// The front door: plain Node without dependencies. Brings the dependencies, then runs what was asked for.
import { spawn, spawnSync } from 'node:child_process';
import { existsSync, statSync } from 'node:fs';
import path from 'node:path';
import process from 'node:process';

const ROOT = path.resolve(import.meta.dirname, '../..');
const COMMANDS = {
  start: 'server/start.ts',
  dev: 'server/cli/dev.ts',
  test: 'server/cli/test.ts',
  import: 'server/cli/import.ts',
  shop: 'server/cli/shop.ts',
  keys: 'server/cli/keys.ts',
  bench: 'tests/bench/index.ts',
  calibrate: 'tests/calibrate/index.ts',
};

function bringDependencies() {
  const lock = path.join(ROOT, 'package-lock.json');
  const installed = path.join(ROOT, 'node_modules/.package-lock.json');
  if (existsSync(installed) && statSync(installed).mtimeMs >= statSync(lock).mtimeMs) return;
  process.stderr.write('Installing the dependencies (npm ci)\n');
  const { status } = spawnSync('npm', ['ci', '--no-audit', '--no-fund'], {
    cwd: ROOT,
    stdio: ['ignore', 'ignore', 'inherit'],
    shell: process.platform === 'win32',
  });
  if (status !== 0) {
    process.stderr.write('npm ci failed: see above.\n');
    process.exit(2);
  }
}

const [command = '', ...args] = process.argv.slice(2);
const script = COMMANDS[command];
if (!script) {
  process.stderr.write(`Unknown command. There are: ${Object.keys(COMMANDS).join(', ')}\n`);
  process.exit(2);
}
const [major = 0, minor = 0] = process.versions.node.split('.').map(Number);
if (major < 20 || (major === 20 && minor < 11)) {
  process.stderr.write(`Node.js 20.11 or newer is needed; this is ${process.version}.\n`);
  process.exit(2);
}
bringDependencies();

const child = spawn(
  process.execPath,
  ['--import', import.meta.resolve('tsx'), path.join(ROOT, script), ...args],
  {
    stdio: 'inherit',
  },
);
// A terminal sends Ctrl-C to both; a service manager to this one alone. Either way the child ends the work in order.
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
  process.on(signal, () => child.kill(signal));
}
child.on('exit', (code, signal) => process.exit(code ?? (signal ? 1 : 0)));
