import type { Knex } from 'knex';
import { NOTICE_KINDS } from '#domain/vocabulary.ts';
import type { NoticeKind } from '#contract/notices.ts';
import { NoticeChoice } from '#db/models/notice-choice.ts';

/** What comes by e-mail as long as a member chose nothing. Not what a letter of its own tells anyway, nor what can come in great numbers. */
const UNLESS_CHOSEN = {
  account: false,
  role: false,
  contribution: true,
  recomputed: false,
  reading: true,
  handover: true,
  message: true,
} as const satisfies Record<NoticeKind, boolean>;

export type ByEmail = Readonly<Record<NoticeKind, boolean>>;

/** For each kind of notice, whether it also comes by e-mail. */
export async function readNoticeChoices(memberId: string, knex: Knex): Promise<ByEmail> {
  const chosen = await NoticeChoice.query(knex).where({ memberId });
  return { ...UNLESS_CHOSEN, ...Object.fromEntries(chosen.map(({ kind, byEmail }) => [kind, byEmail])) };
}

/** Keeps what a member chose; kinds that are not named stay as they are. */
export async function chooseNotices(memberId: string, byEmail: Partial<ByEmail>, trx: Knex.Transaction): Promise<ByEmail> {
  const rows = NOTICE_KINDS.flatMap((kind) => (byEmail[kind] === undefined ? [] : [{ memberId, kind, byEmail: byEmail[kind] }]));
  if (rows.length > 0) await NoticeChoice.query(trx).insert(rows).onConflict(['memberId', 'kind']).merge();
  return readNoticeChoices(memberId, trx);
}
