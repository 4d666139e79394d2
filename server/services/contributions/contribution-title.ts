import type { Knex } from 'knex';
import { formOf } from '#contract/kinds.ts';
import type { FactKind } from '#domain/vocabulary.ts';
import { asLabel } from '#server/services/facts/as-label.ts';
import { nameFact } from '#server/services/facts/name-facts.ts';
import { kindModule } from '#server/services/kinds/all-kinds.ts';
import { parsePayload } from '#server/services/kinds/parse-payload.ts';

/** What a contribution is about, in words: what its payload would be called, else the fact it changes, else its kind. */
export async function contributionTitle(kind: FactKind, subjectId: string | null, payload: unknown, knex: Knex): Promise<string> {
  const said = parsePayload(kind, payload);
  if (said.ok) return asLabel(await kindModule(kind).titleOf(said.value, knex));
  const subject = subjectId === null ? undefined : await nameFact(subjectId, knex);
  return asLabel(subject?.title ?? `A new ${formOf(kind).name.toLowerCase()}`);
}
