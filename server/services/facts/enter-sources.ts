import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import type { Citation, NewSource } from '#contract/citations.ts';
import type { FactCitation } from '#db/models/fact-citation.ts';
import { Source } from '#db/models/source.ts';
import { freeSlug } from '#server/services/kinds/free-slug.ts';

/** The citations with every source on record: those that are new are entered as their contributor's. */
export async function enterSources(citations: readonly Citation[], contributorId: string, trx: Knex.Transaction): Promise<readonly FactCitation[]> {
  const entered: FactCitation[] = [];
  for (const { sourceId, newSource, field, locator, note } of citations) {
    const id = newSource === null ? sourceId : await enterSource(newSource, contributorId, trx);
    if (id === null) throw new RangeError('A citation of no source: it was to be refused before');
    entered.push({ sourceId: id, field, locator, note });
  }
  return entered;
}

async function enterSource(source: NewSource, contributorId: string, trx: Knex.Transaction): Promise<string> {
  const isTheirs = source.kind === 'sighting' || source.kind === 'own-knowledge';
  const { id } = await Source.query(trx).insert({
    id: uuidV7(),
    slug: await freeSlug({ table: 'sources', text: source.title }, trx),
    ...source,
    memberId: isTheirs ? contributorId : null,
    enteredById: contributorId,
    enteredAt: trx.raw('clock_timestamp()'),
  });
  return id;
}
