import type { Knex } from 'knex';
import type { Member } from '#db/models/member.ts';
import { RecoveryCode } from '#db/models/recovery-code.ts';
import type { SignInStrength } from '#db/vocabulary.ts';
import { requireRecentProof } from '#server/policies/identity.ts';
import type { MemberViewer } from '#server/policies/viewer.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { endSessionsOf } from '#server/services/people/sessions.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { lockSelf } from './lock-self.ts';
import { hasSecondFactor, readSecondFactors } from './read-second-factors.ts';
import { tellSecondFactorChange } from './tell-second-factor-change.ts';

export type SecondFactorDeed = {
  readonly way: 'authenticator' | 'passkey';
  readonly deed: 'added' | 'removed';
};

/**
 * Adds or removes a second factor, with all that goes along: a recent proof is asked for, every other session ends, this one gets a new
 * secret and what it proves, the member is told, and it is written down. Who removes the last one owes one again, and recovery codes, which
 * stand in for nothing then, go with it.
 *
 * @throws ProblemError `identity-not-confirmed`, `not-signed-in`, and what the change itself throws.
 */
export async function changeSecondFactors<Answer>(
  viewer: MemberViewer,
  { way, deed }: SecondFactorDeed,
  change: (member: Member, trx: Knex.Transaction) => Promise<Answer>,
  { session, requestId }: RequestContext,
  knex: Knex,
): Promise<Answer> {
  requireRecentProof(viewer);
  return withTransaction(
    knex,
    async (trx) => {
      const member = await lockSelf(viewer, trx);
      const answer = await change(member, trx);
      const anyLeft = hasSecondFactor(await readSecondFactors(viewer.id, trx));
      if (!anyLeft) await RecoveryCode.query(trx).delete().where({ memberId: viewer.id });
      const ended = await endSessionsOf(viewer.id, trx, { except: viewer.sessionId });
      await session.renew(strengthAfter(viewer, deed, anyLeft), trx);
      await tellSecondFactorChange(member, `${way}-${deed}`, trx);
      await writeAudit(
        {
          act: `second-factor.${deed}`,
          actorId: viewer.id,
          subject: { kind: 'member', id: viewer.id },
          detail: { way, otherSessionsEnded: ended },
          requestId,
        },
        trx,
      );
      return answer;
    },
    { actorId: viewer.id },
  );
}

/** Whoever adds a second factor has just shown that they have it. */
function strengthAfter(viewer: MemberViewer, deed: SecondFactorDeed['deed'], anyLeft: boolean): SignInStrength {
  if (!anyLeft) return 'password';
  return deed === 'added' ? 'second-factor' : viewer.strength;
}
