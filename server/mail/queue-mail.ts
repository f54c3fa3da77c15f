import type { Transaction } from '../db/client';
import { mails } from '../db/schema/index';
import type { Deps } from '../deps';
import type { Message } from './messages';

/** Notes a mail as queued in the use case's transaction; call `deps.jobs.wake('mail')` once that is committed. */
export async function queueMail(
  tx: Transaction,
  deps: Pick<Deps, 'jobs'>,
  shopId: string,
  mail: Message & { to: string },
): Promise<void> {
  const [row] = await tx
    .insert(mails)
    .values({
      shopId,
      purpose: mail.purpose,
      toAddress: mail.to,
      subject: mail.subject,
      textBody: mail.text,
    })
    .returning({ id: mails.id });
  if (!row) throw new Error('no mail row');
  await deps.jobs.send(tx, 'mail', { shopId, mailId: row.id });
}
