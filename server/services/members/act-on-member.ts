import type { Knex } from 'knex';
import { Member } from '#db/models/member.ts';
import { Session } from '#db/models/session.ts';
import { requireRecentProof } from '#server/policies/identity.ts';
import { requireMayDoToMember } from '#server/policies/members.ts';
import type { MemberDeed } from '#server/policies/members.ts';
import { requireRegistrar } from '#server/policies/staff.ts';
import type { MemberViewer } from '#server/policies/viewer.ts';
import { isLastRegistrar } from '#server/services/people/registrars.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { memberPage } from './read-member.ts';
import type { MemberPageOnRecord } from './read-member.ts';

export type ActOnMember = {
  readonly deed: MemberDeed;
  readonly id: string;
  /** The version the registrar looked at; without one the deed does not depend on what they saw. */
  readonly version?: number;
};

/** What a deed works with: the row of the member, held until the transaction ends, and who does it. */
export type MemberInHand = { readonly member: Member; readonly registrar: MemberViewer };

/**
 * Does something to a member as a registrar. Such deeds happen one at a time, and whether who does it may, is asked again when it is their
 * turn: of two who unmake each other, one remains.
 *
 * @throws ProblemError `not-found` for everybody but registrars and for an id nobody with an account has; `second-factor-owed`;
 *   `identity-not-confirmed`; `conflict` where the member changed since they were looked at, or it can't be done to them; `not-allowed`.
 */
export async function actOnMember(
  { deed, id, version }: ActOnMember,
  act: (hand: MemberInHand, trx: Knex.Transaction) => Promise<void>,
  { viewer }: RequestContext,
  knex: Knex,
): Promise<MemberPageOnRecord> {
  const registrar = requireRegistrar(viewer);
  requireRecentProof(registrar);
  return withTransaction(
    knex,
    async (trx) => {
      const lastRegistrar = await isLastRegistrar(id, trx);
      await requireStillRegistrar(registrar, trx);
      const member = await Member.query(trx).findById(id).forUpdate();
      if (!member || (member.email === null && member.closedAt === null)) throw new ProblemError('not-found', 'Nobody of this id has an account.');
      requireMayDoToMember(deed, registrar, {
        id,
        emailVerifiedAt: member.emailVerifiedAt,
        suspendedAt: member.suspendedAt,
        closedAt: member.closedAt,
        lastRegistrar,
      });
      if (version !== undefined && version !== member.version) {
        throw new ProblemError('conflict', 'Another registrar changed this member meanwhile. Look at them again first.');
      }
      await act({ member, registrar }, trx);
      return memberPage(registrar, id, trx);
    },
    { actorId: registrar.id },
  );
}

/** As the database has it now that no other registrar acts: the request may have waited for one who unmade this one. */
async function requireStillRegistrar(registrar: MemberViewer, trx: Knex.Transaction): Promise<void> {
  const still = await Member.query(trx).findById(registrar.id).where({ role: 'registrar' }).whereNull('suspendedAt');
  const session = await Session.query(trx).findOne({ publicId: registrar.sessionId, stage: 'open', strength: 'second-factor' });
  if (!still || !session) throw new ProblemError('not-found', 'There is nothing at this address.');
}
