import { randomBytes } from 'node:crypto';
import type { KeyScope } from '../../shared/roles';
import { hashSecret } from './authenticate';

/** A new key and what is stored of it: the hash, its last four characters, what it may do. */
export function newApiKey(scopes: readonly KeyScope[]) {
  const key = `wm_${randomBytes(32).toString('base64url')}`;
  return {
    key,
    stored: {
      keyHash: hashSecret(key),
      keyHint: key.slice(-4),
      mayImport: scopes.includes('import'),
      mayRead: scopes.includes('read'),
    },
  };
}
