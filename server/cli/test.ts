import { spawn } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { z } from 'zod';
import { buildClientIfStale } from '../client-build';
import { installDebianPackages, requirePostgres } from '../db/postgres-binaries';

/**
 * Every test, on what a fresh machine has: brings PostgreSQL, Chromium and poppler from Debian's packages, builds the
 * client for the browser tests, runs them all, and says how many passed and failed.
 */
const ROOT = path.resolve(import.meta.dirname, '../..');
const TOOLS = [
  { file: '/usr/bin/chromium', debianPackage: 'chromium' },
  { file: '/usr/bin/pdftoppm', debianPackage: 'poppler-utils' },
];
// The browser tests come last and alone: two cores shared with heavy computations would slow every page.
const ROUNDS = [['analytics', 'client', 'server'], ['e2e']];

const say = (line: string) => void process.stderr.write(`${line}\n`);

const report = z.object({
  numPassedTests: z.number(),
  numFailedTests: z.number(),
  numPendingTests: z.number(),
  numTodoTests: z.number(),
  testResults: z.array(z.object({ status: z.string(), assertionResults: z.array(z.unknown()) })),
});

async function runRound(projects: readonly string[], folder: string, filters: readonly string[]) {
  const outputFile = path.join(folder, `${projects.join('-')}.json`);
  const code = await new Promise<number>((resolve) => {
    const child = spawn(
      process.execPath,
      [
        path.join(ROOT, 'node_modules/vitest/vitest.mjs'),
        'run',
        ...projects.flatMap((project) => ['--project', project]),
        '--reporter=default',
        '--reporter=json',
        `--outputFile.json=${outputFile}`,
        '--passWithNoTests',
        ...filters,
      ],
      { cwd: ROOT, stdio: 'inherit', env: { ...process.env, NODE_ENV: 'test' } },
    );
    const pass = (signal: NodeJS.Signals) => void child.kill(signal);
    process.once('SIGINT', pass);
    process.once('SIGTERM', pass);
    child.once('exit', (exitCode) => resolve(exitCode ?? 1));
  });
  if (!existsSync(outputFile)) return { passed: 0, failed: 1, skipped: 0 };
  const result = report.parse(JSON.parse(readFileSync(outputFile, 'utf8')));
  // A file that could not be loaded has no tests of its own to count, yet it failed.
  const unloaded = result.testResults.filter(
    (file) => file.status === 'failed' && file.assertionResults.length === 0,
  );
  const failed = result.numFailedTests + unloaded.length;
  return {
    passed: result.numPassedTests,
    failed: code !== 0 && failed === 0 ? 1 : failed,
    skipped: result.numPendingTests + result.numTodoTests,
  };
}

const missing = TOOLS.filter((tool) => !existsSync(tool.file)).map((tool) => tool.debianPackage);
if (missing.length > 0) installDebianPackages(missing, say);
requirePostgres(say);
buildClientIfStale(say);

const folder = mkdtempSync(path.join(os.tmpdir(), 'witness-mark-report-'));
const total = { passed: 0, failed: 0, skipped: 0 };
for (const projects of ROUNDS) {
  const round = await runRound(projects, folder, process.argv.slice(2));
  total.passed += round.passed;
  total.failed += round.failed;
  total.skipped += round.skipped;
}
rmSync(folder, { recursive: true, force: true });
process.stdout.write(
  `\n${total.passed} passed, ${total.failed} failed${total.skipped > 0 ? `, ${total.skipped} skipped` : ''}\n`,
);
process.exit(total.failed > 0 || total.passed === 0 ? 1 : 0);
