import type { Knex } from 'knex';
import { FactName } from '#db/models/fact-name.ts';

/** What a fact in the catalogue is called and belongs to; nothing where it is not, or no longer, in it. */
export async function nameOf(factId: string, knex: Knex): Promise<FactName | undefined> {
  return FactName.query(knex).findById(factId);
}

/** What it is called within the name of another, which may be put forward before the first is there. */
export async function titleOf(factId: string, knex: Knex): Promise<string> {
  return (await nameOf(factId, knex))?.title ?? '(nothing in the catalogue)';
}
