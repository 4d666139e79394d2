import type { Knex } from 'knex';
import type { SessionStage, SignInStrength } from '#db/vocabulary.ts';
import type { Viewer } from '#server/policies/viewer.ts';

export type SessionStart = {
  readonly memberId: string;
  readonly stage: SessionStage;
  readonly strength: SignInStrength;
};

/** The session a request came with, and what may become of it. Its cookie is written only where the request succeeds. */
export type RequestSession = {
  /** Begins a session under a new secret and ends the one the request came with, whosever it was. */
  readonly start: (start: SessionStart, trx: Knex.Transaction) => Promise<void>;
  /**
   * Gives the request's session a new secret, so that the old one is worth nothing, and takes this moment for the last proof of
   * identity. How long it may live does not change.
   */
  readonly renew: (strength: SignInStrength, trx: Knex.Transaction) => Promise<void>;
  /** Ends it, if there is one, and has the browser forget the cookie. */
  readonly end: (trx: Knex.Transaction) => Promise<void>;
};

/** Whose password was right and whose second factor is still to come. */
export type SignInOwed = { readonly memberId: string; readonly sessionId: string };

/** What a service needs to know about a request besides what was sent. */
export type RequestContext = {
  readonly viewer: Viewer;
  readonly owed: SignInOwed | null;
  readonly requestId: string;
  /** Where it came from, in CIDR notation: one address of IPv4, the /64 a household has of IPv6. */
  readonly network: string;
  readonly session: RequestSession;
};
