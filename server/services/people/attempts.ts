import { createHash } from 'node:crypto';
import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import { z } from 'zod';
import { Attempt } from '#db/models/attempt.ts';
import type { AttemptKind } from '#db/vocabulary.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { withTransaction } from '#server/services/transaction.ts';

/** So many within the hour are free; after them each must wait, first so many seconds, then twice as many, up to the longest wait. */
type Pace = { readonly free: number; readonly first: number; readonly longest: number };

/**
 * Wrong passwords: some seventy an hour for one account however fast they come, under the hundred that ASVS 4.0.3 2.2.1 allows. An
 * office behind one address gets more. A code of six digits is guessed sooner than a password, so it is waited for longer. Letters: a
 * mailbox is not to be filled on a stranger's word.
 */
const PACES: Readonly<Record<AttemptKind, { readonly account: Pace; readonly network: Pace }>> = {
  password: { account: { free: 5, first: 1, longest: 60 }, network: { free: 30, first: 1, longest: 30 } },
  'second-factor': { account: { free: 5, first: 2, longest: 900 }, network: { free: 30, first: 1, longest: 60 } },
  letter: { account: { free: 3, first: 60, longest: 1_800 }, network: { free: 20, first: 10, longest: 600 } },
};

export type AttemptClaim = { readonly kind: AttemptKind; readonly account: string; readonly network: string };

/** What attempts on an account are counted under: the address itself is not kept, as it may be nobody's or anybody's. */
export function accountKey(email: string): string {
  return createHash('sha256').update(email.normalize('NFKC').toLowerCase()).digest('hex');
}

/**
 * Counts an attempt as failed before it is made, so that many at once are no way round, and commits that. It is forgiven when it turns
 * out right. All times are the database's.
 *
 * @throws ProblemError `too-many-requests` with the seconds to wait; that attempt is not counted and must not be made.
 */
export async function claimAttempt({ kind, account, network }: AttemptClaim, knex: Knex): Promise<void> {
  const pace = PACES[kind];
  const wait = await withTransaction(knex, async (trx) => {
    await lockInOrder([`${kind} ${account}`, `${kind} ${network}`], trx);
    await Attempt.query(trx).delete().whereRaw(`at < clock_timestamp() - interval '1 day'`);
    const ofAccount = await countRecent({ kind, account }, trx);
    const ofNetwork = await countRecent({ kind, network }, trx);
    const left = Math.max(secondsLeft(ofAccount, pace.account), secondsLeft(ofNetwork, pace.network));
    if (left === 0) {
      await Attempt.query(trx).insert({ id: uuidV7(), kind, account, network, at: trx.raw('clock_timestamp()') });
    }
    return left;
  });
  if (wait > 0) {
    throw new ProblemError('too-many-requests', `There were too many attempts. Wait ${inWords(wait)}, then try again.`, { retryAfter: wait });
  }
}

/** Forgets the failed attempts of a kind on an account: whoever it belongs to has shown that they are there. */
export async function forgiveAttempts(kind: AttemptKind, account: string, trx: Knex.Transaction): Promise<void> {
  await Attempt.query(trx).delete().where({ kind, account });
}

type Recent = { readonly count: number; readonly secondsSince: number };
const RecentRow = z.object({ count: z.string().transform(Number), secondsSince: z.number().nullable() });

async function countRecent(which: Partial<AttemptClaim>, trx: Knex.Transaction): Promise<Recent> {
  const [row] = z.array(RecentRow).parse(
    await trx('attempts')
      .where(which)
      .whereRaw(`at > clock_timestamp() - interval '1 hour'`)
      .select(trx.raw('count(*)'), trx.raw('extract(epoch from clock_timestamp() - max(at)) as seconds_since')),
  );
  return { count: row?.count ?? 0, secondsSince: row?.secondsSince ?? 0 };
}

function secondsLeft({ count, secondsSince }: Recent, { free, first, longest }: Pace): number {
  if (count < free) return 0;
  const wait = Math.min(first * 2 ** (count - free), longest);
  return Math.max(0, Math.ceil(wait - secondsSince));
}

/** In one order for everybody, so that two who want the same two do not wait for each other. */
async function lockInOrder(names: readonly string[], trx: Knex.Transaction): Promise<void> {
  for (const name of names.toSorted()) await trx.raw('select pg_advisory_xact_lock(hashtextextended(?, 0))', [name]);
}

function inWords(seconds: number): string {
  if (seconds === 1) return 'a second';
  return seconds <= 90 ? `${seconds} seconds` : `${Math.ceil(seconds / 60)} minutes`;
}
