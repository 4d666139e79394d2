import { setTimeout as wait } from 'node:timers/promises';
import type { Knex } from 'knex';
import { MailMessage } from '#db/models/mail-message.ts';
import { MailError } from '#server/mail/mailer.ts';
import type { Mailer } from '#server/mail/mailer.ts';
import { writeLetter } from '#server/mail/mail-templates.ts';
import { settleMessage } from './settle-message.ts';

/** Longer than one try may take, so that a second one begins only after the first is over, whatever became of it. */
const LEASE = '2 minutes';

/** Tries to note that a letter was sent, a second apart: this is the one thing that must not be forgotten. */
const NOTING_TRIES = 10;
const NOTING_PAUSE = 1_000;

type Delivery = { readonly knex: Knex; readonly mailer: Mailer; readonly signal: AbortSignal };

/**
 * Sends a letter unless it was sent, given up or erased before. The server's word that it took the letter and our note of it are two
 * things: where the process or the database dies between them the letter goes out twice, with one Message-ID. Everything else ends in
 * exactly one.
 *
 * @throws MailError when it could not be sent now and another try may help; Error while another try is under way.
 */
export async function deliverMessage(messageId: string, { knex, mailer, signal }: Delivery): Promise<void> {
  const message = await claim(messageId, knex);
  if (!message) return;
  try {
    const letter = writeLetter(message.template, message.data, mailer.origin);
    await mailer.send({ id: message.id, to: message.toAddress ?? '', letter }, signal);
  } catch (error) {
    await noteFailure(messageId, error, knex);
    if (error instanceof MailError && error.isFinal) return;
    throw error;
  }
  await noteSent(messageId, knex);
}

async function claim(messageId: string, knex: Knex): Promise<MailMessage | undefined> {
  const claimed = await MailMessage.query(knex)
    .findById(messageId)
    .where({ state: 'queued' })
    .where((free) => void free.whereNull('leasedUntil').orWhere('leasedUntil', '<=', knex.fn.now()))
    .patch({ attempts: knex.raw('attempts + 1'), lastAttemptAt: knex.fn.now(), leasedUntil: knex.raw('now() + ?::interval', [LEASE]) })
    .returning('*')
    .first();
  if (claimed) return claimed;
  const held = await MailMessage.query(knex).findById(messageId).where({ state: 'queued' });
  if (held) throw new Error('Another try to send this letter is under way');
  return undefined;
}

async function noteFailure(messageId: string, error: unknown, knex: Knex): Promise<void> {
  const reason = error instanceof MailError ? error.message : 'could not be written';
  if (error instanceof MailError && error.isFinal) {
    await settleMessage(messageId, { state: 'failed', lastError: reason }, knex);
    return;
  }
  await MailMessage.query(knex).findById(messageId).where({ state: 'queued' }).patch({ lastError: reason, leasedUntil: null });
}

async function noteSent(messageId: string, knex: Knex): Promise<void> {
  for (let left = NOTING_TRIES - 1; ; left -= 1) {
    try {
      await settleMessage(messageId, { state: 'sent', lastError: null }, knex);
      return;
    } catch (error) {
      if (left === 0) throw error;
      await wait(NOTING_PAUSE);
    }
  }
}
