import type { Knex } from 'knex';
import type { NoticeKind } from '#contract/notices.ts';
import { MailMessage } from '#db/models/mail-message.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { chooseNotices } from './notice-choices.ts';
import { hashOfToken } from './notify.ts';

/**
 * Stops e-mails of the kind the link came with, as often as it is asked. The link is all that is needed and all it can do.
 *
 * @throws ProblemError `not-found` for a link that no letter carried, or whose account is closed.
 */
export async function unsubscribe(token: string, knex: Knex): Promise<NoticeKind> {
  return withTransaction(knex, async (trx) => {
    const letter = await MailMessage.query(trx).findOne({ unsubscribeHash: hashOfToken(token) });
    if (!letter?.memberId || !letter.noticeKind) throw new ProblemError('not-found', 'This link is not one of ours, or its account is closed.');
    await chooseNotices(letter.memberId, { [letter.noticeKind]: false }, trx);
    return letter.noticeKind;
  });
}
