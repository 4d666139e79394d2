import type { Knex } from 'knex';
import { Rework } from '#db/models/rework.ts';
import type { CipherCache } from '#server/services/cipher-cache.ts';
import { today } from '#server/services/today.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { finishRework } from './finish-rework.ts';
import { countResting, partsAfter } from './parts-at-hand.ts';
import { takeTurn } from './take-turn.ts';
import { whatChanged } from './what-changed.ts';
import { workOutParts } from './work-out-parts.ts';
import type { WorkOutMeans } from './work-out-parts.ts';
import { noteMachines, writeChanges } from './write-changes.ts';

/** Parts gone through in one transaction, those that don’t rest on the fact counted, unless a test says otherwise. */
const PARTS_AT_ONCE = 2_000;

/** One lot takes a second or two, so whoever waits for another’s gives up only when something is wrong. */
const PATIENCE = '30s';

type Means = {
  readonly knex: Knex;
  readonly ciphers: CipherCache;
  /** Stops the work between two lots of parts. */
  readonly signal: AbortSignal;
  readonly partsAtOnce?: number;
};

/**
 * Works out again everything that rests on a fact, lot by lot, from where an earlier run stopped, and tells the owners of machines on
 * which something came out otherwise. Each lot is one transaction with the note of how far the work has come, so a run that is killed
 * loses at most the lot in hand, and two runs at once share the work. A rework that is done stays so.
 *
 * Lots take turns, those of other reworks too: each reads the catalogue and writes what follows from it while no other does, so what is
 * written last follows from the catalogue as it was entered last.
 *
 * @throws whatever the signal was raised with.
 */
export async function runRework(reworkId: string, { knex, ciphers, signal, partsAtOnce = PARTS_AT_ONCE }: Means): Promise<void> {
  const means: WorkOutMeans = { ciphers, asOf: await today(knex), datings: new Map() };
  for (;;) {
    signal.throwIfAborted();
    const isOver = await withTransaction(knex, (trx) => workOutLot(reworkId, partsAtOnce, means, trx));
    if (isOver) return;
  }
}

/** Answers whether there was nothing left to do. */
async function workOutLot(reworkId: string, partsAtOnce: number, means: WorkOutMeans, trx: Knex.Transaction): Promise<boolean> {
  for (const limit of ['lock_timeout', 'statement_timeout', 'idle_in_transaction_session_timeout']) {
    await trx.raw('select set_config(?, ?, true)', [limit, PATIENCE]);
  }
  await takeTurn('reworks', trx);
  const rework = await Rework.query(trx).findById(reworkId).forUpdate();
  // One that is gone went with a database that was made anew.
  if (rework === undefined || rework.state === 'done') return true;

  const total = rework.total ?? (await countResting(rework, trx));
  const atHand = await partsAfter(rework, partsAtOnce, trx);
  if (atHand.last === null) {
    await finishRework(rework, trx);
    return true;
  }
  const changes = whatChanged(atHand, await workOutParts(atHand, means, trx));
  await writeChanges(changes, trx);
  await noteMachines(reworkId, changes, trx);
  await rework.$query(trx).patch({
    state: 'running',
    reached: atHand.last,
    done: rework.done + atHand.parts.length + atHand.dates.length,
    total,
    changed: rework.changed + changes.changed,
  });
  return false;
}
