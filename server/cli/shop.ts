import bcrypt from 'bcrypt';
import { randomBytes } from 'node:crypto';
import { parseArgs } from 'node:util';
import pg from 'pg';
import { z } from 'zod';
import { email } from '../../shared/session';
import { BCRYPT_COST } from '../resources/session/service';
import { openForCommand, runCommand, sayToPerson } from './open-database';

const options = z.strictObject({ name: z.string().trim().min(1).max(120), owner: email });

/** Makes a shop and its owner; the generated password is the last line. */
async function makeShop({ name, owner }: z.infer<typeof options>): Promise<string> {
  const { migratorUrl, close } = await openForCommand(sayToPerson);
  const client = new pg.Client({ connectionString: migratorUrl });
  try {
    await client.connect();
    await client.query('BEGIN');
    const shop = await client.query<{ id: string }>(
      'INSERT INTO shops (name) VALUES ($1) ON CONFLICT DO NOTHING RETURNING id',
      [name],
    );
    const shopId = shop.rows[0]?.id;
    if (!shopId) throw new Error(`There is a shop named ${name} already.`);
    const { userId, password } = await makeOwner(client, owner);
    await client.query(`INSERT INTO memberships (shop_id, user_id, role) VALUES ($1, $2, 'owner')`, [
      shopId,
      userId,
    ]);
    await client.query(
      `INSERT INTO audit_log (shop_id, action, subject, subject_id, detail) VALUES ($1::uuid, 'create', 'shop', $1::uuid::text, $2)`,
      [shopId, { name, owner }],
    );
    await client.query('COMMIT');
    return password;
  } finally {
    await client.end();
    close();
  }
}

/**
 * Whoever has an account already keeps it and gets a new password all the same, because what this command answers has to
 * open the door; who runs it has the database in hand. Their open sessions end.
 */
async function makeOwner(client: pg.Client, owner: string) {
  const password = randomBytes(15).toString('base64url');
  const { rows } = await client.query<{ id: string; was_there: boolean }>(
    `INSERT INTO users (email, display_name, password_hash) VALUES ($1, $2, $3)
     ON CONFLICT (email) DO UPDATE SET password_hash = excluded.password_hash
     RETURNING id, xmax <> 0 AS was_there`,
    [owner, owner.split('@')[0], await bcrypt.hash(password, BCRYPT_COST)],
  );
  const [user] = rows;
  if (!user) throw new Error('no user row');
  await client.query('UPDATE sessions SET revoked_at = now() WHERE user_id = $1 AND revoked_at IS NULL', [
    user.id,
  ]);
  if (user.was_there)
    sayToPerson(`${owner} had an account: this shop is added to it, and its password is new.`);
  return { userId: user.id, password };
}

runCommand(async () => {
  const { values } = parseArgs({ options: { name: { type: 'string' }, owner: { type: 'string' } } });
  const asked = options.safeParse(values);
  if (!asked.success) throw new Error('Use: npm run shop -- --name NAME --owner EMAIL');
  const password = await makeShop(asked.data);
  sayToPerson(`${asked.data.name} is there. ${asked.data.owner} signs in with this password:`);
  process.stdout.write(`${password}\n`);
});
