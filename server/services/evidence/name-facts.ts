import type { Knex } from 'knex';
import type { EvidenceSubject } from '#contract/evidence.ts';
import { FactName } from '#db/models/fact-name.ts';

/** What facts are called, to link them; one that left the catalogue meanwhile has no name. */
export async function factSubjects(ids: readonly string[], knex: Knex): Promise<(id: string) => EvidenceSubject | null> {
  const names = await FactName.query(knex).whereIn('id', [...new Set(ids)]);
  const byId = new Map(names.map(({ id, kind, slug, title }) => [id, { kind, id, slug, title }]));
  return (id) => byId.get(id) ?? null;
}
