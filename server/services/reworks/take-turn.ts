import type { Knex } from 'knex';

/** Reworks go one lot at a time; members’ own acts go together, between two lots. */
const LOCKS = {
  reworks: `select pg_advisory_xact_lock(hashtextextended('reworks', 0))`,
  acts: `select pg_advisory_xact_lock_shared(hashtextextended('reworks', 0))`,
} as const;

/**
 * Waits until parts may be worked out, and holds that until the transaction ends: each reads the catalogue and writes what follows from it while
 * no other does, so what is written last follows from the catalogue as it was entered last. To be taken before any row is locked, as a lot of a
 * rework locks rows while it has its turn.
 */
export async function takeTurn(whose: keyof typeof LOCKS, trx: Knex.Transaction): Promise<void> {
  await trx.raw(LOCKS[whose]);
}
