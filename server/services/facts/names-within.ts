import type { Knex } from 'knex';
import { formOf } from '#contract/kinds.ts';
import { Account } from '#db/models/account.ts';
import { Source } from '#db/models/source.ts';
import type { FactKind } from '#domain/vocabulary.ts';
import { nameFacts } from '#server/services/facts/name-facts.ts';
import type { NamedFact } from '#server/services/facts/name-facts.ts';
import type { NameOf } from './differences.ts';

type Said = { readonly payload: Readonly<Record<string, unknown>>; readonly citations: readonly unknown[] };

/** What everything that payloads and their sources refer to is called. */
export type NamesWithin = {
  readonly facts: readonly NamedFact[];
  readonly sources: readonly Source[];
  readonly nameOf: NameOf;
};

const UUID = /^[0-9a-f]{8}(?:-[0-9a-f]{4}){3}-[0-9a-f]{12}$/i;

export async function namesWithin(kind: FactKind, said: readonly Said[], knex: Knex): Promise<NamesWithin> {
  const { fields } = formOf(kind);
  const idsAt = (control: 'fact' | 'account'): string[] =>
    fields.filter((field) => field.control === control).flatMap(({ key }) => said.flatMap(({ payload }) => idFrom(payload[key])));
  const sourceIds = said.flatMap(({ citations }) => citations).flatMap((citation) => idFrom(isRecord(citation) ? citation['sourceId'] : null));

  const facts = await nameFacts(idsAt('fact'), knex);
  const accountIds = idsAt('account');
  const accounts = accountIds.length === 0 ? [] : await Account.query(knex).findByIds(accountIds);
  const sources = sourceIds.length === 0 ? [] : await Source.query(knex).findByIds([...new Set(sourceIds)]);
  const titles = new Map([...facts.values(), ...accounts].map(({ id, title }) => [id, title]));
  return { facts: [...facts.values()], sources, nameOf: (id) => titles.get(id) };
}

function idFrom(value: unknown): string[] {
  return typeof value === 'string' && UUID.test(value) ? [value] : [];
}

function isRecord(value: unknown): value is Readonly<Record<string, unknown>> {
  return typeof value === 'object' && value !== null;
}
