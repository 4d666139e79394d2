import type { Request, RequestHandler, Response } from 'express';
import type { Knex } from 'knex';
import { VISITOR } from '#server/policies/viewer.ts';
import type { MemberViewer } from '#server/policies/viewer.ts';
import { onlyOnce } from '#server/services/only-once.ts';
import type { KeyedRequest } from '#server/services/only-once.ts';
import { deviceOf } from '#server/services/people/device.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { hashOfSecret } from '#server/services/people/secrets.ts';
import type { FoundSession } from '#server/services/people/sessions.ts';
import { requestIdOf } from '../logging.ts';
import { validateSession } from './lucia.ts';
import { networkOf } from './network.ts';
import { manageSession } from './request-session.ts';
import type { SessionCookie } from './session-cookie.ts';

export type Identity = {
  readonly context: RequestContext;
  /** Writes the session cookie, where the request changed it; for an answer that says it succeeded. */
  readonly writeCookie: (response: Response) => void;
  /** Does what a keyed request asks for, once. */
  readonly once: (keyed: KeyedRequest, work: () => Promise<unknown>) => Promise<unknown>;
};

const identities = new WeakMap<Request, Identity>();

/** Finds out who is asking, once a request. A cookie of no living session is a visitor's. */
export function identify(knex: Knex, cookie: SessionCookie): RequestHandler {
  return async (request, response, next) => {
    response.vary('Cookie');
    const secret = cookie.read(request);
    const found = secret === null ? null : await validateSession(hashOfSecret(secret), knex);
    const { writeCookie, ...session } = manageSession(secret, deviceOf(request.headers['user-agent']), cookie);
    const context: RequestContext = {
      viewer: found?.stage === 'open' ? viewerOf(found) : VISITOR,
      owed: found?.stage === 'owed' ? { memberId: found.memberId, sessionId: found.publicId } : null,
      requestId: requestIdOf(request),
      network: networkOf(request.ip),
      session,
    };
    identities.set(request, { context, writeCookie, once: (keyed, work) => onlyOnce(keyed, work, knex) });
    next();
  };
}

/** Where `identify` has not run, a visitor who can't sign in: nobody is let in by a middleware that was forgotten. */
export function identityOf(request: Request): Identity {
  return identities.get(request) ?? nobody(request);
}

function nobody(request: Request): Identity {
  const refuse = (): never => {
    throw new RangeError('Nobody has found out who is asking');
  };
  return {
    context: {
      viewer: VISITOR,
      owed: null,
      requestId: requestIdOf(request),
      network: networkOf(request.ip),
      session: { start: refuse, renew: refuse, end: refuse },
    },
    writeCookie: () => undefined,
    once: refuse,
  };
}

function viewerOf(found: FoundSession): MemberViewer {
  return {
    kind: 'member',
    id: found.memberId,
    displayName: found.displayName,
    role: found.role,
    moderates: found.scope === 'all' ? 'all' : found.makerIds,
    sessionId: found.publicId,
    strength: found.strength,
    confirmedAt: found.confirmedAt,
    confirmedRecently: found.confirmedRecently,
    hasSecondFactor: found.hasSecondFactor,
    secondFactorOwed: found.role !== 'member' && found.strength !== 'second-factor',
  };
}
