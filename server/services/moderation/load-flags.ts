import type { Knex } from 'knex';
import { Flag } from '#db/models/flag.ts';
import { nameFacts } from '#server/services/facts/name-facts.ts';
import type { NamedFact } from '#server/services/facts/name-facts.ts';

/** A flag with who raised and settled it, and the fact it is about. */
export type FlagOnRecord = { readonly id: string; readonly flag: Flag; readonly fact: NamedFact };

export async function loadFlags(ids: readonly string[], knex: Knex): Promise<readonly FlagOnRecord[]> {
  const flags = await Flag.query(knex).findByIds([...ids]).withGraphFetched('[by, settledBy]');
  const facts = await nameFacts(flags.map(({ factId }) => factId), knex);
  return flags.flatMap((flag) => {
    const fact = facts.get(flag.factId);
    return fact ? [{ id: flag.id, flag, fact }] : [];
  });
}
