import type { Knex } from 'knex';
import { Notice } from '#db/models/notice.ts';

export function countUnread(memberId: string, knex: Knex): Promise<number> {
  return Notice.query(knex).where({ memberId }).whereNull('readAt').resultSize();
}
