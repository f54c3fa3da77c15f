import { and, eq } from 'drizzle-orm';
import { mails } from '../db/schema/index';
import { withShop } from '../db/tenancy';
import type { Deps } from '../deps';
import { createMailer, type Mailer } from './mailer';
import { withLinks } from './password-link';

/**
 * Sends a queued mail once. `sending` is committed before the server is spoken to: a process that ends in between leaves
 * it so, and nobody gets the same mail twice.
 */
export async function deliverMail(
  deps: Deps,
  { shopId, mailId }: { shopId: string; mailId: string },
  mailer: Mailer = createMailer(deps.config),
): Promise<void> {
  const messageId = `<${mailId}@${new URL(deps.config.publicUrl).hostname}>`;
  const [mail] = await withShop(deps.database, shopId, (tx) =>
    tx
      .update(mails)
      .set({ state: 'sending', messageId })
      .where(and(eq(mails.id, mailId), eq(mails.state, 'queued')))
      .returning({ to: mails.toAddress, subject: mails.subject, text: mails.textBody }),
  );
  if (!mail) return;
  const delivery = await mailer.send({ ...mail, text: withLinks(mail.text, deps), messageId });
  await withShop(deps.database, shopId, (tx) =>
    tx
      .update(mails)
      .set(
        delivery.state === 'sent'
          ? { state: 'sent', sentAt: deps.now() }
          : { state: delivery.state, error: delivery.reason },
      )
      .where(eq(mails.id, mailId)),
  );
  if (delivery.state !== 'sent') deps.logger.warn({ mailId, state: delivery.state }, 'mail was not sent');
}
