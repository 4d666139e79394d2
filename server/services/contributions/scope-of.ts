import type { Knex } from 'knex';
import type { PayloadOf } from '#contract/kinds.ts';
import type { FactKind } from '#domain/vocabulary.ts';
import { nameFact } from '#server/services/facts/name-facts.ts';
import { kindModule } from '#server/services/kinds/all-kinds.ts';

/**
 * Whose moderators decide about what is put forward: those of the maker it belongs to. What belongs to none, and what takes a fact from
 * one maker to another, is for moderators of all makers: null.
 */
export async function scopeOf<K extends FactKind>(kind: K, subjectId: string | null, payload: PayloadOf<K>, knex: Knex): Promise<string | null> {
  const said = await kindModule(kind).makerOf(payload, knex);
  if (subjectId === null) return said;
  const belongsTo = (await nameFact(subjectId, knex))?.makerId ?? null;
  return kind === 'maker' || said === belongsTo ? belongsTo : null;
}
