import type { Knex } from 'knex';
import { MailMessage } from '#db/models/mail-message.ts';

type Outcome = { readonly state: 'sent' | 'failed'; readonly lastError: string | null };

/** Ends a letter's wait. What it said is forgotten, and so is its address where it belongs to no account. Does nothing to a settled one. */
export async function settleMessage(messageId: string, { state, lastError }: Outcome, knex: Knex): Promise<void> {
  await MailMessage.query(knex)
    .findById(messageId)
    .where({ state: 'queued' })
    .patch({
      state,
      lastError,
      data: null,
      toAddress: knex.raw('case when member_id is null then null else to_address end'),
      leasedUntil: null,
      settledAt: knex.fn.now(),
    });
}
