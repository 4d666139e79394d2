import type { Knex } from 'knex';
import { ContributionOpening } from '#db/models/contribution-opening.ts';
import type { Member } from '#db/models/member.ts';

/** Who looked at each contribution within the last minute, by the database's clock, without one of them. */
export async function whoHasOpen(contributionIds: readonly string[], withoutId: string | null, knex: Knex): Promise<ReadonlyMap<string, readonly Member[]>> {
  const query = ContributionOpening.query(knex)
    .whereIn('contributionId', [...contributionIds])
    .whereRaw(`seen_at > now() - interval '60 seconds'`)
    .orderBy('seenAt')
    .withGraphFetched('member');
  if (withoutId !== null) void query.whereNot('memberId', withoutId);
  const open = new Map<string, Member[]>();
  for (const { contributionId, member } of await query) if (member) open.set(contributionId, [...(open.get(contributionId) ?? []), member]);
  return open;
}
