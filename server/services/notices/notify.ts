import { createHash, randomBytes } from 'node:crypto';
import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import type { NoticeKind } from '#contract/notices.ts';
import { Member } from '#db/models/member.ts';
import { Notice } from '#db/models/notice.ts';
import { queueMail } from '#server/mail/queue-mail.ts';
import { SitePath } from '#server/mail/site-path.ts';
import { readNoticeChoices } from './notice-choices.ts';

export type NewNotice = {
  readonly memberId: string;
  readonly kind: NoticeKind;
  readonly title: string;
  readonly body: string;
  /** An address of this site, from its first slash on; null where it leads nowhere. */
  readonly href: string | null;
};

/**
 * Tells a member something, in the transaction of the act it tells of: here, and by e-mail where the member wants that kind so, has a
 * confirmed address and an account that is open.
 *
 * @throws ZodError for an `href` that could lead to another site.
 */
export async function notify({ memberId, kind, title, body, href }: NewNotice, trx: Knex.Transaction): Promise<void> {
  const path = SitePath.nullable().parse(href);
  await Notice.query(trx).insert({ id: uuidV7(), memberId, kind, title, body, href: path });

  const member = await Member.query(trx).findById(memberId).whereNotNull('emailVerifiedAt').whereNull('suspendedAt').whereNull('closedAt');
  if (!member?.email) return;
  const byEmail = await readNoticeChoices(memberId, trx);
  if (!byEmail[kind]) return;
  const secret = randomBytes(32);
  const token = secret.toString('base64url');
  await queueMail(
    {
      to: member.email,
      memberId,
      template: 'notice',
      data: { kind, title, body, href: path, unsubscribeToken: token },
      unsubscribe: { kind, hash: hashOfToken(token) },
    },
    trx,
  );
}

/** What is kept of a link's secret. */
export function hashOfToken(token: string): Buffer {
  return createHash('sha256').update(token).digest();
}
