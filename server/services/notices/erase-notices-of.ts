import type { Knex } from 'knex';
import { NoticeChoice } from '#db/models/notice-choice.ts';
import { Notice } from '#db/models/notice.ts';

/** Forgets what a member was told and chose, when the account is closed. */
export async function eraseNoticesOf(memberId: string, trx: Knex.Transaction): Promise<void> {
  await Notice.query(trx).where({ memberId }).delete();
  await NoticeChoice.query(trx).where({ memberId }).delete();
}
