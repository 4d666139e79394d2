import type { Knex } from 'knex';
import type { EvidenceGroup } from '#contract/evidence.ts';
import { countsBy } from '#server/services/counts-by.ts';
import { countOf } from './evidence-group.ts';

/** Rows of a table that name the fact in a column. */
export type Referring = { readonly code: string; readonly title: string; readonly table: string; readonly column: string };

/** How much of the catalogue and the record refers to a fact, a group for each; of a new fact nothing can. */
export async function countReferring(factId: string | null, referring: readonly Referring[], knex: Knex): Promise<EvidenceGroup[]> {
  if (factId === null) return [];
  const groups: EvidenceGroup[] = [];
  for (const { code, title, table, column } of referring) {
    const counts = await countsBy({ table, owner: column }, [factId], knex);
    groups.push(countOf(code, title, counts.get(factId) ?? 0));
  }
  return groups;
}
