import { parseArgs } from 'node:util';
import pg from 'pg';
import { z } from 'zod';
import { KEY_SCOPES } from '../../shared/roles';
import { newApiKey } from '../http/api-key';
import { openForCommand, runCommand, sayToPerson } from './open-database';

const options = z.strictObject({
  shop: z.string().trim().min(1),
  scope: z
    .string()
    .transform((text) => text.split(',').map((scope) => scope.trim()))
    .pipe(z.array(z.enum(KEY_SCOPES)).min(1)),
  name: z.string().trim().min(1).max(120).default('Made at the shell'),
});

/** Makes a key of a shop, valid at once, and answers it. */
async function makeKey({ shop, scope, name }: z.infer<typeof options>): Promise<string> {
  const { migratorUrl, close } = await openForCommand(sayToPerson);
  const client = new pg.Client({ connectionString: migratorUrl });
  try {
    await client.connect();
    const { key, stored } = newApiKey(scope);
    const { rowCount } = await client.query(
      `WITH made AS (
         INSERT INTO api_keys (shop_id, name, key_hash, key_hint, may_import, may_read)
         SELECT id, $2, $3, $4, $5, $6 FROM shops WHERE name = $1 RETURNING shop_id, id)
       INSERT INTO audit_log (shop_id, action, subject, subject_id, detail)
       SELECT shop_id, 'create', 'key', id::text, $7 FROM made`,
      [shop, name, stored.keyHash, stored.keyHint, stored.mayImport, stored.mayRead, { name, scopes: scope }],
    );
    if (rowCount !== 1) throw new Error(`There is no shop named ${shop}.`);
    return key;
  } finally {
    await client.end();
    close();
  }
}

runCommand(async () => {
  const { values } = parseArgs({
    options: { shop: { type: 'string' }, scope: { type: 'string' }, name: { type: 'string' } },
  });
  const asked = options.safeParse(values);
  if (!asked.success) throw new Error('Use: npm run keys -- --shop NAME --scope import,read [--name WORDS]');
  const key = await makeKey(asked.data);
  sayToPerson(`This key of ${asked.data.shop} is shown once:`);
  process.stdout.write(`${key}\n`);
});
