import type { Knex } from 'knex';
import { z } from 'zod';
import { Maker } from '#db/models/maker.ts';
import { Member } from '#db/models/member.ts';
import { HAS_SECOND_FACTOR } from '#server/services/people/sessions.ts';

/** A member as registrars see them. */
export type MemberOnRecord = {
  readonly id: string;
  readonly member: Member;
  /** Those a moderator of some makers decides for, by name; none of everybody else. */
  readonly makers: readonly Maker[];
  readonly secondFactor: boolean;
  /** When they last asked for something signed in, as far as it is on record. */
  readonly lastSeenAt: string | null;
};

const Traces = z.array(z.object({ id: z.string(), secondFactor: z.boolean(), lastSeenAt: z.string().nullable() }));

/** Sessions are gone once they end; what was done in them is not. */
const LAST_SEEN = `greatest(
  (select max(s.last_seen_at) from sessions s where s.member_id = members.id and s.stage = 'open'),
  (select max(a.at) from audit_rows a where a.actor_id = members.id)
)`;

/** Members by id, in any order, in as many statements for many as for one. */
export async function loadMembers(ids: readonly string[], knex: Knex): Promise<readonly MemberOnRecord[]> {
  const members = await Member.query(knex).findByIds([...ids]).withGraphFetched('[suspendedBy, scopes]');
  const makers = await Maker.query(knex)
    .whereIn('id', members.flatMap(({ scopes = [] }) => scopes.map(({ makerId }) => makerId)))
    .orderBy('name');
  const traces = Traces.parse(
    await knex('members')
      .whereIn('id', [...ids])
      .select('id', knex.raw('? as second_factor', [knex.raw(HAS_SECOND_FACTOR)]), knex.raw('? as last_seen_at', [knex.raw(LAST_SEEN)])),
  );
  const traceOf = new Map(traces.map((trace) => [trace.id, trace]));
  return members.map((member) => {
    const own = new Set(member.scopes?.map(({ makerId }) => makerId));
    return {
      id: member.id,
      member,
      makers: makers.filter(({ id }) => own.has(id)),
      secondFactor: traceOf.get(member.id)?.secondFactor ?? false,
      lastSeenAt: traceOf.get(member.id)?.lastSeenAt ?? null,
    };
  });
}
