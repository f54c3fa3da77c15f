import { execFile } from 'node:child_process';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openHouse, type House } from './house';

let house: House;
beforeAll(async () => {
  house = await openHouse();
});
afterAll(() => house.close());

const CLI = path.resolve(import.meta.dirname, '../../server/cli');

function run(command: string, ...args: string[]): Promise<{ code: number; lines: string[]; said: string }> {
  return new Promise((resolve) => {
    execFile(
      process.execPath,
      ['--import', 'tsx', path.join(CLI, `${command}.ts`), ...args],
      { env: { ...process.env, DATABASE_URL: house.migratorUrl, DATA_DIR: house.deps.config.dataDir } },
      (error, stdout, said) =>
        resolve({ code: Number(error?.code ?? 0), lines: stdout.trimEnd().split('\n'), said }),
    );
  });
}

const signIn = (email: string, password: string) =>
  house.anonymous().post('/api/v1/session').send({ email, password });

describe('commands', () => {
  it('make a shop, its owner, and a key that works at once', async () => {
    const made = await run('shop', '--name', 'Upper Mill', '--owner', 'Owner@Mill.example');
    expect(made.code).toBe(0);
    const session = await signIn('owner@mill.example', made.lines.at(-1) ?? '');
    expect(session.body).toMatchObject({ shop: { name: 'Upper Mill', role: 'owner' } });

    const key = await run('keys', '--shop', 'Upper Mill', '--scope', 'import,read');
    expect(key.code).toBe(0);
    const bearer = `Bearer ${key.lines.at(-1)}`;
    await house.anonymous().get('/api/v1/repairs').set('Authorization', bearer).expect(200);
    await house.anonymous().get('/api/v1/keys').set('Authorization', bearer).expect(403);
    const stored = await house.migrator.query(`SELECT FROM api_keys k WHERE k::text LIKE '%' || $1 || '%'`, [
      key.lines.at(-1),
    ]);
    expect(stored.rowCount).toBe(0);
  });

  it('give an owner who is known already the second shop too, and a password that works', async () => {
    await run('shop', '--name', 'Lower Mill', '--owner', 'both@mill.example');
    const second = await run('shop', '--name', 'Weir', '--owner', 'both@mill.example');
    const session = await signIn('both@mill.example', second.lines.at(-1) ?? '');
    expect(session.body.shops.map(({ name }: { name: string }) => name)).toEqual(['Lower Mill', 'Weir']);
  });

  it('say in a line what is wrong, make nothing, and exit with 2', async () => {
    await run('shop', '--name', 'Taken', '--owner', 'first@mill.example');
    const again = await run('shop', '--name', 'Taken', '--owner', 'second@mill.example');
    expect(again).toMatchObject({ code: 2, said: 'There is a shop named Taken already.\n' });
    const { rowCount } = await house.migrator.query(`SELECT FROM users WHERE email = 'second@mill.example'`);
    expect(rowCount).toBe(0);
    expect(await run('keys', '--shop', 'Nowhere', '--scope', 'read')).toMatchObject({ code: 2 });
    expect(await run('keys', '--shop', 'Taken', '--scope', 'everything')).toMatchObject({ code: 2 });
  });
});
