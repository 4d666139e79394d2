import type { Knex } from 'knex';
import { Notice } from '#db/models/notice.ts';
import { countUnread } from './count-unread.ts';

/**
 * Marks a member's notices read: those named, or all. One that is another's is as if it were not there.
 *
 * @returns how many are unread now
 */
export async function markNoticesRead(memberId: string, ids: readonly string[] | undefined, knex: Knex): Promise<number> {
  const unread = Notice.query(knex).where({ memberId }).whereNull('readAt').patch({ readAt: knex.fn.now() });
  await (ids ? unread.whereIn('id', [...ids]) : unread);
  return countUnread(memberId, knex);
}
