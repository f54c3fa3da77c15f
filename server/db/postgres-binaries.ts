import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readdirSync, writeFileSync } from 'node:fs';
import path from 'node:path';

const DEBIAN_ROOT = '/usr/lib/postgresql';
const CREATE_CLUSTER_CONF = '/etc/postgresql-common/createcluster.conf';

export const isRoot = () => process.getuid?.() === 0;

/** The folder of the newest PostgreSQL server that Debian's packages installed, if any. */
function findBinaries(): string | undefined {
  if (!existsSync(DEBIAN_ROOT)) return undefined;
  return readdirSync(DEBIAN_ROOT)
    .sort((a, b) => Number(b) - Number(a))
    .map((version) => path.join(DEBIAN_ROOT, version, 'bin'))
    .find((folder) => existsSync(path.join(folder, 'initdb')) && existsSync(path.join(folder, 'postgres')));
}

/** Installs Debian packages, saying so; asks for root only where it must. */
export function installDebianPackages(names: readonly string[], say: (line: string) => void): void {
  const prefix = isRoot() ? [] : ['sudo'];
  say(`Installing from Debian's packages: ${names.join(', ')}`);
  const run = (command: string[]) =>
    spawnSync(command[0] ?? '', command.slice(1), {
      stdio: ['inherit', 'ignore', 'inherit'],
      env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
    }).status;
  const install = [...prefix, 'apt-get', 'install', '-y', '--no-install-recommends', ...names];
  if (run(install) === 0) return;
  run([...prefix, 'apt-get', 'update']);
  if (run(install) !== 0) {
    throw new Error(`${names.join(', ')} could not be installed. As an administrator: ${install.join(' ')}`);
  }
}

/** Where PostgreSQL's programs are; installs them where missing, without Debian's own cluster. */
export function requirePostgres(say: (line: string) => void): string {
  const found = findBinaries();
  if (found) return found;
  if (isRoot() && !existsSync(CREATE_CLUSTER_CONF)) {
    mkdirSync(path.dirname(CREATE_CLUSTER_CONF), { recursive: true });
    writeFileSync(CREATE_CLUSTER_CONF, 'create_main_cluster = false\n');
  }
  installDebianPackages(['postgresql'], say);
  const installed = findBinaries();
  if (!installed) throw new Error(`PostgreSQL was installed, but no server was found under ${DEBIAN_ROOT}.`);
  return installed;
}
