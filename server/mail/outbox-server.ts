import { simpleParser } from 'mailparser';
import { randomUUID } from 'node:crypto';
import { mkdir, readdir, readFile, rename, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { buffer } from 'node:stream/consumers';
import { SMTPServer } from 'smtp-server';

export type OutboxMessage = { file: string; to: string; subject: string; text: string };

export type OutboxServer = {
  smtpUrl: string;
  /** What has arrived so far, the oldest first. */
  messages: () => Promise<OutboxMessage[]>;
  stop: () => Promise<void>;
};

/**
 * The mail server where none is set: takes every message over SMTP on loopback and keeps it as an .eml file in the data
 * folder's `outbox`, delivering none.
 */
export async function startOutboxServer(dataDir: string): Promise<OutboxServer> {
  const folder = path.join(dataDir, 'outbox');
  await mkdir(folder, { recursive: true });
  const server = new SMTPServer({
    disabledCommands: ['AUTH', 'STARTTLS'],
    size: 25 * 1024 * 1024,
    disableReverseLookup: true,
    onData: (stream, _session, callback) => {
      keep(folder, stream).then(() => callback(), callback);
    },
  });
  // A client that breaks off is no reason to end; what it was sending is noted as unknown on its side.
  server.on('error', () => undefined);
  const port = await new Promise<number>((resolve, reject) => {
    server.once('error', reject);
    const listener = server.listen(0, '127.0.0.1', () => {
      const address = listener.address();
      if (address && typeof address === 'object') resolve(address.port);
      else reject(new Error('the outbox has no port'));
    });
  });
  return {
    smtpUrl: `smtp://127.0.0.1:${port}`,
    messages: async () => {
      const files = (await readdir(folder)).filter((file) => file.endsWith('.eml')).sort();
      return Promise.all(files.map((file) => read(path.join(folder, file))));
    },
    stop: () => new Promise((resolve) => server.close(() => resolve())),
  };
}

/** Written beside and then renamed, so that a file that is there is a whole message. */
async function keep(folder: string, stream: NodeJS.ReadableStream): Promise<void> {
  const name = `${new Date().toISOString().replaceAll(':', '')}-${randomUUID().slice(0, 8)}`;
  const unfinished = path.join(folder, `${name}.part`);
  await writeFile(unfinished, await buffer(stream), { mode: 0o600 });
  await rename(unfinished, path.join(folder, `${name}.eml`));
}

async function read(file: string): Promise<OutboxMessage> {
  const parsed = await simpleParser(await readFile(file));
  const to = [parsed.to ?? []].flat().map((address) => address.text);
  return { file, to: to.join(', '), subject: parsed.subject ?? '', text: parsed.text ?? '' };
}
