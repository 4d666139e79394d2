import type { Knex } from 'knex';
import { Passkey } from '#db/models/passkey.ts';
import type { MemberViewer } from '#server/policies/viewer.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { changeSecondFactors } from './change-second-factors.ts';

/**
 * Removes one of the member's passkeys.
 *
 * @throws NotFoundError for one that is not, and for one that is another member's; ProblemError `identity-not-confirmed`.
 */
export async function removePasskey(viewer: MemberViewer, id: string, context: RequestContext, knex: Knex): Promise<void> {
  await changeSecondFactors(
    viewer,
    { way: 'passkey', deed: 'removed' },
    async (_member, trx) => await Passkey.query(trx).delete().where({ id, memberId: viewer.id }).throwIfNotFound(),
    context,
    knex,
  );
}
