import type { Knex } from 'knex';
import { z } from 'zod';
import { MEMBER_ROLES } from '#domain/vocabulary.ts';
import { Session } from '#db/models/session.ts';
import { MEMBER_SCOPES, SESSION_STAGES, SIGN_IN_STRENGTHS } from '#db/vocabulary.ts';

type Lifetime = { readonly idle: number; readonly most: number };

const MINUTE = 60;
const HOUR = 60 * MINUTE;
const DAY = 24 * HOUR;

/** Seconds a session lives unused, and in all. */
export const LIFETIMES = {
  owed: { idle: 10 * MINUTE, most: 10 * MINUTE },
  member: { idle: 7 * DAY, most: 30 * DAY },
  staff: { idle: 30 * MINUTE, most: 12 * HOUR },
} as const satisfies Record<string, Lifetime>;

/** Seconds a proof of identity is good for. */
const PROOF_LASTS = 10 * MINUTE;

/** Whether a member has a confirmed authenticator or a passkey; `members.id` must be in reach. */
export const HAS_SECOND_FACTOR = `(
  exists (select from authenticators a where a.member_id = members.id and a.confirmed_at is not null)
  or exists (select from passkeys p where p.member_id = members.id)
)`;

/** Seconds until a session ends, by the database's clock; not above zero: it has ended. */
const SECONDS_LEFT = `extract(epoch from least(
  sessions.last_seen_at + make_interval(secs => ${lifetimeColumn('Idle')}),
  sessions.started_at + make_interval(secs => ${lifetimeColumn('Most')})
) - now())`;

const LIFETIME_BINDINGS = {
  owedIdle: LIFETIMES.owed.idle,
  owedMost: LIFETIMES.owed.most,
  memberIdle: LIFETIMES.member.idle,
  memberMost: LIFETIMES.member.most,
  staffIdle: LIFETIMES.staff.idle,
  staffMost: LIFETIMES.staff.most,
} as const;

const FoundSession = z.object({
  id: z.string(),
  publicId: z.string(),
  memberId: z.string(),
  stage: z.enum(SESSION_STAGES),
  strength: z.enum(SIGN_IN_STRENGTHS),
  confirmedAt: z.string(),
  displayName: z.string(),
  role: z.enum(MEMBER_ROLES),
  scope: z.enum(MEMBER_SCOPES),
  makerIds: z.array(z.string()),
  hasSecondFactor: z.boolean(),
  confirmedRecently: z.boolean(),
  secondsSinceSeen: z.number(),
  secondsLeft: z.number(),
});
export type FoundSession = z.infer<typeof FoundSession>;

/** A session by the hash of its secret with the member it belongs to, ended or not; none of a member who is suspended or gone. */
export async function findSession(id: string, knex: Knex): Promise<FoundSession | null> {
  const row: unknown = await knex('sessions')
    .join('members', 'members.id', 'sessions.memberId')
    .where('sessions.id', id)
    .whereNull('members.suspendedAt')
    .whereNull('members.closedAt')
    .first(
      'sessions.id',
      'sessions.publicId',
      'sessions.memberId',
      'sessions.stage',
      'sessions.strength',
      'sessions.confirmedAt',
      'members.displayName',
      'members.role',
      'members.scope',
      knex.raw('array(select maker_id::text from member_scopes s where s.member_id = members.id order by maker_id) as maker_ids'),
      knex.raw('? as has_second_factor', [knex.raw(HAS_SECOND_FACTOR)]),
      knex.raw('sessions.confirmed_at > now() - make_interval(secs => ?) as confirmed_recently', [PROOF_LASTS]),
      knex.raw('extract(epoch from now() - sessions.last_seen_at) as seconds_since_seen'),
      knex.raw('? as seconds_left', [knex.raw(SECONDS_LEFT, LIFETIME_BINDINGS)]),
    );
  return row === undefined ? null : FoundSession.parse(row);
}

/** Notes that a session was used just now. */
export async function touchSession(id: string, knex: Knex): Promise<void> {
  await Session.query(knex)
    .where({ id })
    .patch({ lastSeenAt: knex.raw('greatest(last_seen_at, now())') });
}

/** The sessions a member is signed in with, the last used first. */
export async function listOpenSessions(memberId: string, knex: Knex): Promise<readonly Session[]> {
  return Session.query(knex)
    .joinRaw('join members on members.id = sessions.member_id')
    .where({ 'sessions.memberId': memberId, 'sessions.stage': 'open' })
    .whereRaw('? > 0', [knex.raw(SECONDS_LEFT, LIFETIME_BINDINGS)])
    .orderBy([{ column: 'sessions.lastSeenAt', order: 'desc' }, 'sessions.publicId'])
    .select('sessions.*');
}

/** Ends a member's sessions, at once and wherever they are; `except` is the public id of one to leave. Answers how many. */
export async function endSessionsOf(memberId: string, trx: Knex.Transaction, { except }: { readonly except?: string } = {}): Promise<number> {
  return Session.query(trx)
    .delete()
    .where({ memberId })
    .modify((query) => {
      if (except !== undefined) void query.whereNot({ publicId: except });
    });
}

/** Clears away what has ended by itself. */
export async function deleteEndedSessions(knex: Knex): Promise<void> {
  await knex('sessions')
    .whereIn(
      'id',
      knex('sessions')
        .join('members', 'members.id', 'sessions.memberId')
        .whereRaw('? <= 0', [knex.raw(SECONDS_LEFT, LIFETIME_BINDINGS)])
        .select('sessions.id'),
    )
    .delete();
}

function lifetimeColumn(which: 'Idle' | 'Most'): string {
  return `case
    when sessions.stage = 'owed' then cast(:owed${which} as integer)
    when members.role = 'member' then cast(:member${which} as integer)
    else cast(:staff${which} as integer)
  end`;
}
