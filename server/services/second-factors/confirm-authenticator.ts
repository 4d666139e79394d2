import type { Knex } from 'knex';
import { Authenticator } from '#db/models/authenticator.ts';
import { requireRecentProof } from '#server/policies/identity.ts';
import type { MemberViewer } from '#server/policies/viewer.ts';
import { claimAttempt, forgiveAttempts } from '#server/services/people/attempts.ts';
import { hashOfSecret } from '#server/services/people/secrets.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { changeSecondFactors } from './change-second-factors.ts';
import { stepOfCode } from './check-authenticator-code.ts';
import { makeFirstRecoveryCodes } from './recovery-codes.ts';

/**
 * Finishes adding an authenticator with a first code of it, which is used up. Answers the recovery codes, or none where the member still has
 * some.
 *
 * @throws ProblemError `invalid` at `code`; `conflict` where none was begun; `identity-not-confirmed`; `too-many-requests`.
 */
export async function confirmAuthenticator(viewer: MemberViewer, code: string, context: RequestContext, knex: Knex): Promise<readonly string[]> {
  requireRecentProof(viewer);
  // Counted apart from codes at sign-in: these guesses are at a secret the member was just shown.
  const account = hashOfSecret(`new authenticator of ${viewer.id}`);
  await claimAttempt({ kind: 'second-factor', account, network: context.network }, knex);

  return changeSecondFactors(
    viewer,
    { way: 'authenticator', deed: 'added' },
    async (_member, trx) => {
      const begun = await Authenticator.query(trx).findById(viewer.id).whereNull('confirmedAt').forUpdate();
      if (!begun) throw new ProblemError('conflict', 'No authenticator is being added. Begin again.');
      const step = await stepOfCode(begun.secret, code, trx);
      if (step === null) {
        throw new ProblemError('invalid', 'See which, and why, under errors.', {
          errors: [{ path: ['code'], message: 'Not the code of now; see that the device’s clock is right' }],
        });
      }
      await begun.$query(trx).patch({ confirmedAt: trx.raw('now()'), lastStep: String(step) });
      await forgiveAttempts('second-factor', account, trx);
      return makeFirstRecoveryCodes(viewer.id, trx);
    },
    context,
    knex,
  );
}
