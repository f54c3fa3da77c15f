import { randomBytes } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import type { Config } from './config';

/** The secret that signs session tokens: from the settings, else generated once and kept in the data folder. */
export function sessionSecretOf(config: Config): string {
  if (config.sessionSecret) return config.sessionSecret;
  const file = path.join(config.dataDir, 'session-secret');
  if (!existsSync(file)) {
    mkdirSync(config.dataDir, { recursive: true });
    writeFileSync(file, randomBytes(48).toString('base64url'), { mode: 0o600 });
  }
  return readFileSync(file, 'utf8').trim();
}
