import type { Knex } from 'knex';
import { Maker } from '#db/models/maker.ts';
import { MemberScope } from '#db/models/member-scope.ts';
import { Member } from '#db/models/member.ts';
import type { SignInStrength } from '#db/vocabulary.ts';
import type { Standing } from '#server/policies/staff.ts';
import { countUnread } from '#server/services/notices/count-unread.ts';
import { readSecondFactors } from '#server/services/second-factors/read-second-factors.ts';
import type { SecondFactors } from '#server/services/second-factors/read-second-factors.ts';

export type MeOnRecord = {
  readonly member: Member;
  /** Those a moderator of some makers decides for, by name; none of everybody else. */
  readonly makers: readonly Maker[];
  readonly standing: Extract<Standing, { kind: 'member' }>;
  readonly secondFactors: SecondFactors;
  readonly unreadNotices: number;
};

/** A member as they see themselves, in a session of that strength. */
export async function readMe(memberId: string, strength: SignInStrength, knex: Knex): Promise<MeOnRecord> {
  const member = await Member.query(knex).findById(memberId).throwIfNotFound();
  const makers = await makersOf(memberId, knex);
  return {
    member,
    makers,
    standing: {
      kind: 'member',
      role: member.role,
      moderates: member.scope === 'all' ? 'all' : makers.map(({ id }) => id),
      secondFactorOwed: member.role !== 'member' && strength !== 'second-factor',
    },
    secondFactors: await readSecondFactors(memberId, knex),
    unreadNotices: await countUnread(memberId, knex),
  };
}

/** The makers a moderator of some makers decides for. */
export async function makersOf(memberId: string, knex: Knex): Promise<readonly Maker[]> {
  return Maker.query(knex).whereIn('id', MemberScope.query(knex).where({ memberId }).select('makerId')).orderBy('name');
}
