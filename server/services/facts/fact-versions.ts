import type { Knex } from 'knex';
import { CipherVersion } from '#db/models/cipher-version.ts';
import type { FactCitation } from '#db/models/fact-citation.ts';
import { FactVersion } from '#db/models/fact-version.ts';
import type { Member } from '#db/models/member.ts';
import type { FactKind } from '#domain/vocabulary.ts';

export type FactIdentity = { readonly id: string; readonly kind: FactKind };

/** A version of a fact of any kind. */
export type VersionOnRecord = {
  readonly number: number;
  /** As its kind's form has it. */
  readonly payload: Readonly<Record<string, unknown>>;
  /** The slug it was entered under; `null`: its kind has none. */
  readonly slug: string | null;
  readonly citations: readonly FactCitation[];
  readonly enteredById: string;
  readonly enteredAt: string;
  readonly reason: string;
  readonly inForce: boolean;
  readonly contributionId: string | null;
  readonly broughtBack: number | null;
  readonly enteredBy: Member | null;
  readonly decidedBy: Member | null;
};

/** Every version of a fact, the newest first; none where there is no such fact. */
export async function versionsOf(fact: FactIdentity, knex: Knex): Promise<readonly VersionOnRecord[]> {
  const [versions] = await versionsOfAll([fact], knex);
  return versions?.versions ?? [];
}

/** The versions of several facts. */
export async function versionsOfAll(
  facts: readonly FactIdentity[],
  knex: Knex,
): Promise<readonly { readonly fact: FactIdentity; readonly versions: readonly VersionOnRecord[] }[]> {
  const cipherIds = facts.filter(({ kind }) => kind === 'cipher').map(({ id }) => id);
  const otherIds = facts.filter(({ kind }) => kind !== 'cipher').map(({ id }) => id);
  const [ofCiphers, ofOthers] = [
    cipherIds.length === 0 ? [] : await CipherVersion.query(knex).whereIn('cipherId', cipherIds).modify('newestFirst').withGraphFetched('[enteredBy, decidedBy]'),
    otherIds.length === 0 ? [] : await FactVersion.query(knex).whereIn('factId', otherIds).modify('newestFirst').withGraphFetched('[enteredBy, decidedBy]'),
  ];
  const byFact = new Map<string, VersionOnRecord[]>();
  const add = (id: string, version: VersionOnRecord): void => void byFact.set(id, [...(byFact.get(id) ?? []), version]);
  for (const row of ofCiphers) add(row.cipherId, versionFrom(row, { ...row.header, definition: row.definition }));
  for (const row of ofOthers) add(row.factId, versionFrom(row, row.payload));
  return facts.map((fact) => ({ fact, versions: byFact.get(fact.id) ?? [] }));
}

function versionFrom(row: FactVersion | CipherVersion, kept: Readonly<Record<string, unknown>>): VersionOnRecord {
  const { slug, ...payload } = kept;
  return {
    number: row.number,
    payload,
    slug: typeof slug === 'string' ? slug : null,
    citations: row.citations,
    enteredById: row.enteredById,
    enteredAt: row.enteredAt,
    reason: row.reason,
    inForce: row.supersededAt === null,
    contributionId: row.contributionId,
    broughtBack: row.broughtBack,
    enteredBy: row.enteredBy ?? null,
    decidedBy: row.decidedBy ?? null,
  };
}
