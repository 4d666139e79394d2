import type { Knex } from 'knex';
import { Fact } from '#db/models/fact.ts';
import { FactName } from '#db/models/fact-name.ts';
import type { FactKind } from '#domain/vocabulary.ts';
import { kindModule } from '#server/services/kinds/all-kinds.ts';
import { parsePayload } from '#server/services/kinds/parse-payload.ts';
import { versionsOfAll } from './fact-versions.ts';
import type { FactIdentity, VersionOnRecord } from './fact-versions.ts';

/** A fact to name and link. */
export type NamedFact = {
  readonly id: string;
  readonly kind: FactKind;
  /** `null`: it has no page of its own, or was retired. */
  readonly slug: string | null;
  readonly title: string;
  readonly makerId: string | null;
};

/** What facts are called, those that were retired by what they last said. An id of no fact is left out. */
export async function nameFacts(ids: readonly string[], knex: Knex): Promise<ReadonlyMap<string, NamedFact>> {
  const names = new Map<string, NamedFact>();
  const wanted = [...new Set(ids)];
  if (wanted.length === 0) return names;
  for (const name of await FactName.query(knex).whereIn('id', wanted)) names.set(name.id, name);
  const gone = wanted.filter((id) => !names.has(id));
  if (gone.length === 0) return names;
  const facts = await Fact.query(knex).findByIds(gone);
  for (const { fact, versions } of await versionsOfAll(facts, knex)) names.set(fact.id, await nameRetired(fact, versions[0], knex));
  return names;
}

/** What one fact is called; nothing where there is no such fact. */
export async function nameFact(id: string, knex: Knex): Promise<NamedFact | undefined> {
  return (await nameFacts([id], knex)).get(id);
}

async function nameRetired({ id, kind }: FactIdentity, last: VersionOnRecord | undefined, knex: Knex): Promise<NamedFact> {
  const said = parsePayload(kind, last?.payload);
  if (!said.ok) return { id, kind, slug: null, title: '(no longer in the catalogue)', makerId: null };
  const { titleOf, makerOf } = kindModule(kind);
  return { id, kind, slug: null, title: await titleOf(said.value, knex), makerId: await makerOf(said.value, knex) };
}
