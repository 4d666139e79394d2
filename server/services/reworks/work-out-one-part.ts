import type { Knex } from 'knex';
import type { CipherCache } from '#server/services/cipher-cache.ts';
import { today } from '#server/services/today.ts';
import { partAtHand } from './parts-at-hand.ts';
import { whatChanged } from './what-changed.ts';
import { workOutParts } from './work-out-parts.ts';
import { writeChanges } from './write-changes.ts';

/**
 * Works out again what one part is, what its marks mean and how it fits where it is, after a change of its marks or of what it is said to be, in
 * that change’s transaction, which has taken its turn (`takeTurn`). Whoever made the change sees what came of it, so nobody is told.
 */
export async function workOutOnePart(partId: string, ciphers: CipherCache, trx: Knex.Transaction): Promise<void> {
  const atHand = await partAtHand(partId, trx);
  const worked = await workOutParts(atHand, { ciphers, asOf: await today(trx), datings: new Map() }, trx);
  await writeChanges(whatChanged(atHand, worked), trx);
}
