import type { Knex } from 'knex';
import { UniqueViolationError } from 'objection';
import type { LinkToken } from '#db/models/link-token.ts';
import { Member } from '#db/models/member.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { takeLink, voidLinksOf } from './link-tokens.ts';
import type { RequestContext } from './request-context.ts';

/**
 * Confirms an address with the link that was sent to it: a new account's, or the one an account is to have from now on. Signs nobody in.
 *
 * @throws ProblemError `invalid` at `token`; `conflict` where another account has taken the address since.
 */
export async function verifyEmail(token: string, { requestId }: RequestContext, knex: Knex): Promise<void> {
  await withTransaction(knex, async (trx) => {
    const link = await takeLink(token, ['verify', 'change-email'], trx);
    await confirm(link, trx);
    // Links sent to an address that is no longer the account's must not work on it.
    if (link.purpose === 'change-email') await voidLinksOf(link.memberId, trx);
    await writeAudit(
      {
        act: link.purpose === 'verify' ? 'account.verified' : 'email.changed',
        actorId: link.memberId,
        subject: { kind: 'member', id: link.memberId },
        requestId,
      },
      trx,
    );
  });
}

async function confirm({ memberId, email }: LinkToken, trx: Knex.Transaction): Promise<void> {
  try {
    await Member.query(trx)
      .findById(memberId)
      .patch({ ...(email === null ? {} : { email }), emailVerifiedAt: trx.raw('now()') });
  } catch (cause) {
    if (!(cause instanceof UniqueViolationError)) throw cause;
    throw new ProblemError('conflict', 'Another account has this address now.', { cause });
  }
}
