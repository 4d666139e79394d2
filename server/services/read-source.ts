import type { Knex } from 'knex';
import { FactName } from '#db/models/fact-name.ts';
import { FactSource } from '#db/models/fact-source.ts';
import { Source } from '#db/models/source.ts';
import type { CountedSource } from './list-sources.ts';

export type SourceOnRecord = CountedSource & {
  readonly behind: readonly { readonly fact: FactName; readonly field: string | null; readonly locator: string | null }[];
};

/** @throws NotFoundError where no source has the slug. */
export async function readSource(slug: string, knex: Knex): Promise<SourceOnRecord> {
  const source = await Source.query(knex).findOne({ slug }).withGraphFetched('member').throwIfNotFound();
  const citations = await FactSource.query(knex).where({ sourceId: source.id });
  const names = await FactName.query(knex).whereIn('id', citations.map(({ factId }) => factId));
  const facts = new Map(names.map((name) => [name.id, name]));
  return {
    source,
    facts: citations.length,
    behind: citations.flatMap(({ factId, field, locator }) => {
      const fact = facts.get(factId);
      return fact ? [{ fact, field, locator }] : [];
    }),
  };
}
