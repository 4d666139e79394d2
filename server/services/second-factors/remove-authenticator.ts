import type { Knex } from 'knex';
import { Authenticator } from '#db/models/authenticator.ts';
import type { MemberViewer } from '#server/policies/viewer.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { changeSecondFactors } from './change-second-factors.ts';

/**
 * Removes the authenticator.
 *
 * @throws NotFoundError where there is none; ProblemError `identity-not-confirmed`.
 */
export async function removeAuthenticator(viewer: MemberViewer, context: RequestContext, knex: Knex): Promise<void> {
  await changeSecondFactors(
    viewer,
    { way: 'authenticator', deed: 'removed' },
    async (_member, trx) => await Authenticator.query(trx).delete().where({ memberId: viewer.id }).whereNotNull('confirmedAt').throwIfNotFound(),
    context,
    knex,
  );
}
