import { rmSync } from 'node:fs';
import { readFile } from 'node:fs/promises';
import { createServer, type Server } from 'node:net';
import path from 'node:path';
import { SMTPServer, type SMTPServerOptions } from 'smtp-server';
import { afterEach, describe, expect, it } from 'vitest';
import { createMailer } from '../../server/mail/mailer';
import { startOutboxServer } from '../../server/mail/outbox-server';
import { scratchFolder } from '../scratch-folder';

const endings: (() => Promise<void> | void)[] = [];
afterEach(async () => {
  for (const ending of endings.splice(0).reverse()) await ending();
});

const mail = {
  to: 'somebody@shop.example',
  subject: 'Café – 2 messages',
  text: '.\nA line that begins with a dot, and one of umlauts: äöü\n',
  messageId: '<1@shop.example>',
};
const mailFrom = 'Witness Mark <witness-mark@shop.example>';

/** Listens on a free port until the test has ended. */
function listen(server: Server): Promise<number> {
  endings.push(() => new Promise((resolve) => server.close(() => resolve())));
  return new Promise((resolve) => {
    server.listen(0, '127.0.0.1', () => {
      const address = server.address();
      resolve(address && typeof address === 'object' ? address.port : 0);
    });
  });
}

/** A mail server that behaves in some other way than the outbox does. */
async function startServer(options: SMTPServerOptions): Promise<string> {
  const server = new SMTPServer({ disabledCommands: ['AUTH', 'STARTTLS'], ...options });
  server.on('error', () => undefined);
  const port = await listen(server.server);
  return `smtp://127.0.0.1:${port}`;
}

describe('the outbox', () => {
  it('takes mail over SMTP and keeps each message as it came, in a file that mail programs open', async () => {
    const dataDir = scratchFolder('outbox');
    endings.push(() => rmSync(dataDir, { recursive: true, force: true }));
    const outbox = await startOutboxServer(dataDir);
    endings.push(outbox.stop);
    const mailer = createMailer({ smtpUrl: outbox.smtpUrl, mailFrom });
    expect(await mailer.send(mail)).toEqual({ state: 'sent' });
    expect(await mailer.send({ ...mail, subject: 'Two\r\nBcc: thief@shop.example' })).toEqual({
      state: 'sent',
    });

    const [first, second] = await outbox.messages();
    expect(first).toMatchObject({ to: mail.to, subject: mail.subject, text: mail.text });
    const source = await readFile(first?.file ?? '', 'utf8');
    expect(source).toMatch(/^Message-ID: <1@shop.example>\r$/m);
    expect(path.dirname(first?.file ?? '')).toBe(path.join(dataDir, 'outbox'));
    expect(await readFile(second?.file ?? '', 'utf8')).not.toMatch(/^Bcc:/m);
  });
});

describe('a delivery', () => {
  it('that the server refuses has failed', async () => {
    const smtpUrl = await startServer({
      onRcptTo: (_address, _session, callback) => callback(new Error('no such person')),
    });
    expect(await createMailer({ smtpUrl, mailFrom }).send(mail)).toMatchObject({
      state: 'failed',
      reason: expect.stringContaining('no such person'),
    });
  });

  it('has failed where there is no server', async () => {
    expect(await createMailer({ smtpUrl: undefined, mailFrom }).send(mail)).toMatchObject({
      state: 'failed',
    });
    const gone = await createMailer({ smtpUrl: 'smtp://127.0.0.1:9', mailFrom }).send(mail);
    expect(gone).toMatchObject({ state: 'failed', reason: expect.stringContaining('ECONNREFUSED') });
  });

  it('is unknown where the server breaks off with the message in hand', async () => {
    const server = createServer((socket) => {
      socket.write('220 here\r\n');
      socket.on('error', () => undefined);
      socket.on('data', (sent) => {
        const text = sent.toString();
        if (/\r\n\.\r\n$/.test(text)) socket.destroy();
        else socket.write(/^DATA/m.test(text) ? '354 go on\r\n' : '250 ok\r\n');
      });
    });
    const port = await listen(server);
    const smtpUrl = `smtp://127.0.0.1:${port}`;
    expect(await createMailer({ smtpUrl, mailFrom }).send(mail)).toMatchObject({ state: 'unknown' });
  });
});
