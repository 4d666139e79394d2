import type { Response } from 'express';
import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import { Session } from '#db/models/session.ts';
import type { RequestSession } from '#server/services/people/request-context.ts';
import { hashOfSecret, newSecret } from '#server/services/people/secrets.ts';
import { createSession, invalidateSession } from './lucia.ts';
import type { SessionCookie } from './session-cookie.ts';

/** What is to become of the browser's cookie. */
type Verdict = { readonly keep: true } | { readonly keep: false } | { readonly secret: string };

export type ManagedSession = RequestSession & {
  /** Writes the cookie, where it changes. */
  readonly writeCookie: (response: Response) => void;
};

/** A request's session; `presented` is the secret it came with, living or not. Run twice, each of its deeds has the effect of the last. */
export function manageSession(presented: string | null, device: string, cookie: SessionCookie): ManagedSession {
  const presentId = presented === null ? null : hashOfSecret(presented);
  let verdict: Verdict = { keep: true };

  const endPresent = async (trx: Knex.Transaction): Promise<void> => {
    if (presentId !== null) await invalidateSession(presentId, trx);
  };

  return {
    start: async ({ memberId, stage, strength }, trx) => {
      await endPresent(trx);
      const secret = newSecret();
      await createSession(hashOfSecret(secret), memberId, { publicId: uuidV7(), stage, strength, device }, trx);
      verdict = { secret };
    },
    renew: async (strength, trx) => {
      if (presentId === null) throw new RangeError('There is no session to renew');
      const secret = newSecret();
      const renewed = await Session.query(trx)
        .where({ id: presentId, stage: 'open' })
        .patch({ id: hashOfSecret(secret), strength, confirmedAt: trx.raw('now()'), lastSeenAt: trx.raw('now()') });
      // Ended by another request while this one was under way: nobody is to be signed in by it.
      if (renewed === 1) verdict = { secret };
    },
    end: async (trx) => {
      await endPresent(trx);
      verdict = { keep: false };
    },
    writeCookie: (response) => {
      if ('secret' in verdict) cookie.write(response, verdict.secret);
      else if (!verdict.keep) cookie.clear(response);
    },
  };
}
