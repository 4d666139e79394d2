import type { Knex } from 'knex';
import { MailMessage } from '#db/models/mail-message.ts';
import { settleMessage } from './settle-message.ts';

/** Notes that a letter will not be sent any more, with what the last try failed of. */
export async function giveUpMessage(messageId: string, knex: Knex): Promise<void> {
  const message = await MailMessage.query(knex).findById(messageId);
  if (message) await settleMessage(messageId, { state: 'failed', lastError: message.lastError ?? 'no try came to an end' }, knex);
}
