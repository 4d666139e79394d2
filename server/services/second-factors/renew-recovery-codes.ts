import type { Knex } from 'knex';
import { requireRecentProof } from '#server/policies/identity.ts';
import type { MemberViewer } from '#server/policies/viewer.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { lockSelf } from './lock-self.ts';
import { hasSecondFactor, readSecondFactors } from './read-second-factors.ts';
import { makeRecoveryCodes } from './recovery-codes.ts';
import { tellSecondFactorChange } from './tell-second-factor-change.ts';

/**
 * New recovery codes in place of the old ones.
 *
 * @throws ProblemError `identity-not-confirmed`; `conflict` where there is no second factor they could stand in for.
 */
export async function renewRecoveryCodes(viewer: MemberViewer, { requestId }: RequestContext, knex: Knex): Promise<readonly string[]> {
  requireRecentProof(viewer);
  return withTransaction(
    knex,
    async (trx) => {
      const member = await lockSelf(viewer, trx);
      if (!hasSecondFactor(await readSecondFactors(viewer.id, trx))) {
        throw new ProblemError('conflict', 'Recovery codes stand in for an authenticator or a passkey. Add one of these first.');
      }
      const codes = await makeRecoveryCodes(viewer.id, trx);
      await tellSecondFactorChange(member, 'recovery-codes-made', trx);
      await writeAudit({ act: 'recovery-codes.renewed', actorId: viewer.id, subject: { kind: 'member', id: viewer.id }, requestId }, trx);
      return codes;
    },
    { actorId: viewer.id },
  );
}
