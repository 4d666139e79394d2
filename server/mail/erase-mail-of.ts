import type { Knex } from 'knex';
import { MailMessage } from '#db/models/mail-message.ts';

/**
 * Forgets a member's addresses, when the account is closed. Letters still waiting are not sent; that there were letters, of which kind and
 * when, stays on record.
 */
export async function eraseMailOf(memberId: string, trx: Knex.Transaction): Promise<void> {
  await MailMessage.query(trx)
    .where({ memberId, state: 'queued' })
    .patch({ state: 'failed', lastError: 'account closed', data: null, settledAt: trx.fn.now(), leasedUntil: null });
  await MailMessage.query(trx).where({ memberId }).patch({ toAddress: null, noticeKind: null, unsubscribeHash: null });
}
