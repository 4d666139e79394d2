import type { Knex } from 'knex';
import type { Mailer } from '#server/mail/mailer.ts';
import { handle } from '#server/queue/job-runner.ts';
import type { JobHandling } from '#server/queue/job-runner.ts';
import { giveUpMail, sendMail } from '#server/queue/mail-jobs.ts';
import { deliverMessage } from '#server/services/mail/deliver-message.ts';
import { giveUpMessage } from '#server/services/mail/give-up-message.ts';

/** Letters handed to the mail server at once. */
const LANES = 3;

export function mailHandlings({ knex, mailer }: { readonly knex: Knex; readonly mailer: Mailer }): readonly JobHandling[] {
  return [
    handle(sendMail, ({ messageId }, { signal }) => deliverMessage(messageId, { knex, mailer, signal }), LANES),
    handle(giveUpMail, ({ messageId }) => giveUpMessage(messageId, knex)),
  ];
}
