import type { Knex } from 'knex';
import { FactSource } from '#db/models/fact-source.ts';
import { FactVersion } from '#db/models/fact-version.ts';
import type { Source } from '#db/models/source.ts';

/** Who entered what is in force of a fact, and what stands behind it. */
export type FactRecord = {
  readonly version: { readonly number: number; readonly enteredAt: string; readonly enteredBy: string };
  readonly sources: readonly CitedSource[];
};

export type CitedSource = Pick<FactSource, 'field' | 'locator' | 'note'> & { readonly source: Pick<Source, 'slug' | 'kind' | 'title'> };

export type FactRecords = {
  /** @throws RangeError for a fact that was not asked for: every fact has a record. */
  readonly of: (factId: string) => FactRecord;
};

/** The records of all facts on a page, in four queries however many they are. */
export async function factRecords(factIds: readonly string[], knex: Knex): Promise<FactRecords> {
  const versions = await FactVersion.query(knex).modify('inForce').whereIn('factId', factIds).withGraphFetched('enteredBy');
  const sources = await citedSources(factIds, knex);
  const byFact = new Map(versions.map((version) => [version.factId, version]));
  return {
    of: (factId) => {
      const version = byFact.get(factId);
      if (!version?.enteredBy) throw new RangeError('No version of this fact was loaded');
      return {
        version: { number: version.number, enteredAt: version.enteredAt, enteredBy: version.enteredBy.displayName },
        sources: sources.get(factId) ?? [],
      };
    },
  };
}

/** The sources behind each fact, those behind the whole of it first. */
export async function citedSources(factIds: readonly string[], knex: Knex): Promise<ReadonlyMap<string, readonly CitedSource[]>> {
  const rows = await FactSource.query(knex).whereIn('factId', factIds).withGraphFetched('source');
  const cited = new Map<string, CitedSource[]>();
  for (const { factId, field, locator, note, source } of rows) {
    if (!source) throw new RangeError('A cited source was not loaded');
    cited.set(factId, [...(cited.get(factId) ?? []), { field, locator, note, source }]);
  }
  for (const sources of cited.values()) sources.sort((one, other) => compareText(sortText(one), sortText(other)));
  return cited;
}

function sortText({ field, source, locator }: CitedSource): string {
  return [field ?? '', source.title, locator ?? ''].join('\n');
}

function compareText(one: string, other: string): number {
  return one < other ? -1 : one > other ? 1 : 0;
}
