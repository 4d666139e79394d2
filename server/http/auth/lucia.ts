import type { Knex } from 'knex';
import { Lucia, TimeSpan } from 'lucia';
import type { Adapter } from 'lucia';
import { Session } from '#db/models/session.ts';
import type { SessionStage, SignInStrength } from '#db/vocabulary.ts';
import { deleteEndedSessions, endSessionsOf, findSession, LIFETIMES, touchSession } from '#server/services/people/sessions.ts';
import type { FoundSession } from '#server/services/people/sessions.ts';

/** Seconds for which "last seen" may lag behind: a page asks for many things at once, and one note of it is enough. */
const SEEN_LAG = 60;

type NewSession = {
  readonly publicId: string;
  readonly stage: SessionStage;
  readonly strength: SignInStrength;
  readonly device: string;
};

declare module 'lucia' {
  // The library's own interface, by which it learns the types of what it carries.
  interface Register {
    Lucia: Lucia;
    DatabaseSessionAttributes: NewSession;
  }
}

/**
 * The session behind a hash, if it still lives; seen from now on. This file is all that knows lucia, which judges by the application's
 * clock when a session has ended and when it is to slide. So it is told the end as that clock will show it: a wrong clock changes nothing.
 */
export async function validateSession(id: string, knex: Knex): Promise<FoundSession | null> {
  const found = await findSession(id, knex);
  if (!found) return null;
  const lucia = new Lucia(adapter(knex, found), { sessionExpiresIn: new TimeSpan(idleOf(found), 's') });
  const { session } = await lucia.validateSession(id);
  if (!session) return null;
  // The library slides a session once half its idle time is gone, which is days: too coarse for "last seen".
  if (!session.fresh && found.stage === 'open' && found.secondsSinceSeen >= SEEN_LAG) await touchSession(id, knex);
  return found;
}

/** Begins a session of a member under the hash of a secret. */
export async function createSession(id: string, memberId: string, attributes: NewSession, trx: Knex.Transaction): Promise<void> {
  await new Lucia(adapter(trx)).createSession(memberId, attributes, { sessionId: id });
}

/** Ends the session behind a hash, if there is one. */
export async function invalidateSession(id: string, trx: Knex.Transaction): Promise<void> {
  await new Lucia(adapter(trx)).invalidateSession(id);
}

function idleOf({ stage, role }: FoundSession): number {
  if (stage === 'owed') return LIFETIMES.owed.idle;
  return role === 'member' ? LIFETIMES.member.idle : LIFETIMES.staff.idle;
}

/** What lucia asks of a database. `found` is the session that was loaded for it, with the member. */
function adapter(knex: Knex, found?: FoundSession): Adapter {
  const asLuciaHasIt = ({ id, memberId, publicId, stage, strength, secondsLeft }: FoundSession) => ({
    id,
    userId: memberId,
    expiresAt: new Date(Date.now() + secondsLeft * 1_000),
    attributes: { publicId, stage, strength, device: '' },
  });
  return {
    getSessionAndUser: () => Promise.resolve(found ? [asLuciaHasIt(found), { id: found.memberId, attributes: {} }] : [null, null]),
    getUserSessions: () => Promise.resolve(found ? [asLuciaHasIt(found)] : []),
    setSession: async ({ id, userId, attributes: { publicId, stage, strength, device } }) => {
      await Session.query(knex).insert({ id, memberId: userId, publicId, stage, strength, device });
    },
    updateSessionExpiration: (id) => touchSession(id, knex),
    deleteSession: async (id) => {
      await Session.query(knex).deleteById(id);
    },
    deleteUserSessions: async (memberId) => {
      await knex.transaction((trx) => endSessionsOf(memberId, trx));
    },
    deleteExpiredSessions: () => deleteEndedSessions(knex),
  };
}
