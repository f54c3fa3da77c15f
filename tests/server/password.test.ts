import supertest from 'supertest';
import { afterAll, afterEach, beforeAll, describe, expect, it, vi } from 'vitest';
import { createApp } from '../../server/app';
import { deliverMail } from '../../server/mail/deliver';
import { createMailer } from '../../server/mail/mailer';
import { recoverMails } from '../../server/mail/recover';
import { openHouse, type House, type TestShop } from './house';

let house: House;
let shop: TestShop;
const NEW_PASSWORD = 'gravel under a blue gate';

beforeAll(async () => {
  house = await openHouse();
  shop = await house.makeShop();
});
afterEach(() => {
  house.deps.now = () => new Date();
});
afterAll(() => house.close());

const post = (address: string, body: object) => house.anonymous().post(`/api/v1${address}`).send(body);
const signIn = (email: string, password: string) => post('/session', { email, password });

const mailsTo = async (email: string) => (await house.outbox.messages()).filter(({ to }) => to === email);

/** The token in the newest mail to an address, once there are so many. */
async function tokenMailedTo(email: string, count = 1): Promise<string> {
  const mails = await vi.waitFor(
    async () => {
      const found = await mailsTo(email);
      expect(found).toHaveLength(count);
      return found;
    },
    { timeout: 20_000, interval: 100 },
  );
  const link = /https?:\S+\/set-password\?token=(\S+)/.exec(mails.at(-1)?.text ?? '');
  expect(link?.[0]).toContain(house.deps.config.publicUrl);
  return link?.[1] ?? '';
}

describe('a forgotten password', () => {
  it('is replaced by a mailed link, once, and signs out everywhere', async () => {
    const { email } = shop.person('counter');
    const agent = await shop.as('counter');
    await post('/password/forgot', { email: ` ${email.toUpperCase()} ` }).expect(204);
    const token = await tokenMailedTo(email);

    await post('/password/set', { token, password: NEW_PASSWORD }).expect(204);
    await agent.get('/api/v1/session').expect(401);
    await signIn(email, shop.password).expect(401);
    await signIn(email, NEW_PASSWORD).expect(200);
    const again = await post('/password/set', { token, password: 'another long password' });
    expect(again.status).toBe(400);
    expect(again.body.errors).toEqual([{ path: '/token', message: 'This link does not work any more.' }]);
    await signIn(email, NEW_PASSWORD).expect(200);
  });

  it('gets the same answer for nobody’s address, and no mail', async () => {
    const nobody = await post('/password/forgot', { email: 'nobody@shop.example' });
    const somebody = await post('/password/forgot', { email: shop.person('accountant').email });
    expect([nobody.status, nobody.text]).toEqual([somebody.status, somebody.text]);
    await tokenMailedTo(shop.person('accountant').email);
    expect(await mailsTo('nobody@shop.example')).toEqual([]);
  });

  it('has a link for an hour, and no more than three an hour', async () => {
    const { email, userId } = shop.person('technician');
    for (let count = 1; count <= 3; count += 1) {
      await post('/password/forgot', { email }).expect(204);
      await tokenMailedTo(email, count);
    }
    const token = await tokenMailedTo(email, 3);
    await post('/password/forgot', { email }).expect(204);
    await post('/password/forgot', { email: shop.person('service_manager').email }).expect(204);
    await tokenMailedTo(shop.person('service_manager').email);
    const links = await house.migrator.query('SELECT FROM password_tokens WHERE user_id = $1', [userId]);
    expect(links.rowCount).toBe(3);

    const tooLate = new Date(Date.now() + 3_600_000);
    house.deps.now = () => tooLate;
    await post('/password/set', { token, password: NEW_PASSWORD }).expect(400);
    house.deps.now = () => new Date();
    await post('/password/set', { token, password: NEW_PASSWORD }).expect(204);
  });

  it('is not readable in the database', async () => {
    const { email } = shop.person('owner');
    await post('/password/forgot', { email }).expect(204);
    const token = await tokenMailedTo(email);
    for (const table of ['password_tokens', 'mails', 'audit_log', 'jobs.job']) {
      const found = await house.migrator.query(`SELECT FROM ${table} t WHERE t::text LIKE '%' || $1 || '%'`, [
        token,
      ]);
      expect(found.rowCount, table).toBe(0);
    }
  });

  it('shows the owner of the shop the mail, with its link in development alone', async () => {
    const owner = await shop.as('owner');
    const token = await tokenMailedTo(shop.person('owner').email);
    const { body } = await owner.get('/api/v1/outbox?limit=1');
    expect(body.data[0]).toMatchObject({ purpose: 'reset', to: shop.person('owner').email, state: 'sent' });
    expect(body.data[0].text).toContain(token);
    const next = await owner.get(`/api/v1/outbox?limit=1&cursor=${body.nextCursor}`);
    expect(next.body.data[0].id).not.toBe(body.data[0].id);

    const config = { ...house.deps.config, environment: 'production' as const };
    const production = supertest.agent(createApp({ ...house.deps, config }));
    await production
      .post('/api/v1/session')
      .send({ email: shop.person('owner').email, password: shop.password })
      .expect(200);
    const hidden = await production.get('/api/v1/outbox');
    expect(hidden.body.data.length).toBeGreaterThan(1);
    expect(JSON.stringify(hidden.body)).not.toContain('token=');

    const stranger = await (await house.makeShop({ roles: ['owner'] })).as('owner');
    expect((await stranger.get('/api/v1/outbox')).body.data).toEqual([]);
  });
});

describe('a new password', () => {
  it.each([
    ['Password1234!', 'tried first'],
    ['qwertyuiop123', 'tried first'],
    ['P@ssw0rd2026', 'tried first'],
    ['aaaaaaaaaaaaab', 'different characters'],
    ['short', '12 characters'],
    ['é'.repeat(40), '72 bytes'],
  ])('is refused where it is easy to guess: %s', async (password, reason) => {
    const guarded = await house.makeShop({ roles: ['owner'] });
    const { email } = guarded.person('owner');
    await post('/password/forgot', { email }).expect(204);
    const token = await tokenMailedTo(email);
    const refused = await post('/password/set', { token, password });
    expect(refused.status).toBe(400);
    expect(refused.body.errors).toEqual([{ path: '/password', message: expect.stringContaining(reason) }]);
    await post('/password/set', { token, password: NEW_PASSWORD }).expect(204);
  });

  it('is refused with the shop’s name or the address in it', async () => {
    const guarded = await house.makeShop({ roles: ['owner'] });
    const { email } = guarded.person('owner');
    await post('/password/forgot', { email }).expect(204);
    const token = await tokenMailedTo(email);
    for (const password of [`Shop ${guarded.id}`, `my ${email.split('@')[0]}!`]) {
      const refused = await post('/password/set', { token, password });
      expect(refused.body.errors).toEqual([
        { path: '/password', message: 'Leave out your e-mail address and the shop’s name.' },
      ]);
    }
  });
});

describe('a mail', () => {
  const stateOf = async (id: string) => {
    const { rows } = await house.migrator.query<{ state: string }>('SELECT state FROM mails WHERE id = $1', [
      id,
    ]);
    return rows[0]?.state;
  };
  const makeMail = async (state: string) => {
    const { rows } = await house.migrator.query<{ id: string }>(
      `INSERT INTO mails (shop_id, purpose, to_address, subject, text_body, state)
       VALUES ($1, 'reset', $2, 'Hello', 'Text', $3) RETURNING id`,
      [shop.id, `${state}@shop.example`, state],
    );
    return rows[0]?.id ?? '';
  };

  it('that was being sent when the service ended is left for a person to judge, and not sent again', async () => {
    const mailId = await makeMail('sending');
    await recoverMails(house.migratorUrl);
    expect(await stateOf(mailId)).toBe('unknown');
    await deliverMail(house.deps, { shopId: shop.id, mailId });
    expect(await stateOf(mailId)).toBe('unknown');
    expect(await mailsTo('sending@shop.example')).toEqual([]);
  });

  it('is sent once, however often it is asked for', async () => {
    const mailId = await makeMail('queued');
    await Promise.all([1, 2, 3].map(() => deliverMail(house.deps, { shopId: shop.id, mailId })));
    expect(await stateOf(mailId)).toBe('sent');
    expect(await mailsTo('queued@shop.example')).toHaveLength(1);
  });

  it('that no server takes is failed', async () => {
    const mailId = await makeMail('queued');
    const unreachable = createMailer({ ...house.deps.config, smtpUrl: 'smtp://127.0.0.1:9' });
    await deliverMail(house.deps, { shopId: shop.id, mailId }, unreachable);
    expect(await stateOf(mailId)).toBe('failed');
  });
});
