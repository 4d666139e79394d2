import type { Knex } from 'knex';
import { ContributionDecision } from '#db/models/contribution-decision.ts';
import type { Contribution } from '#db/models/contribution.ts';
import type { Decision } from '#domain/vocabulary.ts';
import { ProblemError } from '#server/services/problem-error.ts';

const DONE: Readonly<Record<Decision, string>> = { enter: 'entered it', 'send-back': 'sent it back', 'turn-down': 'turned it down' };

/**
 * That it still waits for a decision.
 *
 * @throws ProblemError `conflict` saying what was done with it, by whom and when.
 */
export async function requireNotDecided({ id, state }: Contribution, trx: Knex.Transaction): Promise<void> {
  if (state === 'put-forward') return;
  if (state === 'withdrawn') throw new ProblemError('conflict', 'Its author withdrew it.');
  const last = await ContributionDecision.query(trx).where({ contributionId: id }).orderBy('at', 'desc').first().withGraphFetched('by');
  if (!last) throw new ProblemError('conflict', 'It is not put forward.');
  const moment = `${last.at.slice(0, 10)} at ${last.at.slice(11, 16)} UTC`;
  throw new ProblemError('conflict', `${last.by?.displayName ?? 'A moderator'} ${DONE[last.decision]} on ${moment}: ${last.reason}`);
}
