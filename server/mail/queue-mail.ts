import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import type { NoticeKind } from '#contract/notices.ts';
import { Email } from '#contract/people.ts';
import { MailMessage } from '#db/models/mail-message.ts';
import { enqueue } from '#server/queue/enqueue.ts';
import { sendMail } from '#server/queue/mail-jobs.ts';
import { MAIL_TEMPLATES } from './mail-templates.ts';
import type { MailData, MailTemplate } from './mail-templates.ts';

export type QueuedMail<Name extends MailTemplate> = {
  readonly to: string;
  readonly template: Name;
  readonly data: MailData<Name>;
  /** Whose address it is, so that it is forgotten with the account. Without one it is forgotten once the letter is settled. */
  readonly memberId?: string;
  /** For a letter that can be unsubscribed from: what kind it is of, and the SHA-256 of the secret in its link. */
  readonly unsubscribe?: { readonly kind: NoticeKind; readonly hash: Buffer };
};

/**
 * Writes a letter and the job that sends it in the transaction of the act it tells of.
 *
 * @throws ZodError for an address that is not one plain address, or for data the template does not take.
 */
export async function queueMail<Name extends MailTemplate>(mail: QueuedMail<Name>, trx: Knex.Transaction): Promise<void> {
  const id = uuidV7();
  await MailMessage.query(trx).insert({
    id,
    memberId: mail.memberId ?? null,
    toAddress: Email.parse(mail.to),
    template: mail.template,
    data: MAIL_TEMPLATES[mail.template].data.parse(mail.data),
    ...(mail.unsubscribe ? { noticeKind: mail.unsubscribe.kind, unsubscribeHash: mail.unsubscribe.hash } : {}),
  });
  await enqueue(sendMail, { messageId: id }, trx);
}
