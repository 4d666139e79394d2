import type { Knex } from 'knex';
import type { QueryBuilder } from 'objection';
import { Member } from '#db/models/member.ts';

/** The member with an address, in whatever case it was typed. */
export function memberByEmail(email: string, knex: Knex): QueryBuilder<Member, Member | undefined> {
  return Member.query(knex).whereRaw('lower(email) = lower(?)', [email]).first();
}
