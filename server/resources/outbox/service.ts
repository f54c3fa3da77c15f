import { desc, sql } from 'drizzle-orm';
import { z } from 'zod';
import { outboxMail } from '../../../shared/administration';
import { instantKey } from '../../db/instant-key';
import { mails } from '../../db/schema/index';
import { withShop } from '../../db/tenancy';
import type { Deps } from '../../deps';
import type { Actor } from '../../http/actor';
import { decodeCursor, pageOf } from '../../http/cursor';
import { withLinks, withoutLinks } from '../../mail/password-link';

const state = outboxMail.shape.state;

/** The latest first. Links that set a password are shown only where no real person is behind them: outside production. */
export async function listOutbox(deps: Deps, actor: Actor, page: { limit: number; cursor?: string }) {
  const after = decodeCursor(page.cursor, z.tuple([z.iso.datetime(), z.uuid()]));
  const rows = await withShop(deps.database, actor.shopId, (tx) =>
    tx
      .select({
        id: mails.id,
        purpose: mails.purpose,
        to: mails.toAddress,
        subject: mails.subject,
        text: mails.textBody,
        state: mails.state,
        createdAt: mails.createdAt,
        key: instantKey(mails.createdAt),
        sentAt: mails.sentAt,
      })
      .from(mails)
      .where(after && sql`(${mails.createdAt}, ${mails.id}) < (${after[0]}::timestamptz, ${after[1]}::uuid)`)
      .orderBy(desc(mails.createdAt), desc(mails.id))
      .limit(page.limit + 1),
  );
  const isProduction = deps.config.environment === 'production';
  const { data, nextCursor } = pageOf(rows, page.limit, (row) => [row.key, row.id]);
  return {
    data: data.map((row) => ({
      id: row.id,
      purpose: row.purpose,
      to: row.to,
      subject: row.subject,
      text: isProduction ? withoutLinks(row.text) : withLinks(row.text, deps),
      state: state.parse(row.state),
      createdAt: row.createdAt.toISOString(),
      sentAt: row.sentAt?.toISOString() ?? null,
    })),
    nextCursor,
  };
}
