import type { Knex } from 'knex';
import type { Findings } from '#contract/evidence.ts';
import type { PayloadOf } from '#contract/kinds.ts';
import type { FactKind } from '#domain/vocabulary.ts';

/** What a contribution would have the catalogue say. */
export type Proposal<K extends FactKind> = {
  /** The fact it changes; null for a new one. */
  readonly factId: string | null;
  readonly payload: PayloadOf<K>;
};

/** What rests on a fact and is worked out again when it changes: every part that one of these touches. */
export type Rests = {
  /** Date marks of castings of these makers, or poured by these foundries. */
  readonly makers: readonly string[];
  /** Parts on machines of these models. */
  readonly models: readonly string[];
};

/** What is needed beside the payload to write a fact's row. */
export type Writing = {
  readonly factId: string;
  /** There is no row: the fact is new, or was retired. */
  readonly isNew: boolean;
  /** The one it has, or had; null: none was ever made. */
  readonly slug: string | null;
  /** The fact's sources, in the order they were cited: a serial range without an account takes that of the first. */
  readonly sourceIds: readonly string[];
};

/** Why a value can't stand, and which. */
export type Refusal = { readonly path: readonly [string, ...(string | number)[]]; readonly message: string };
export type Refusals = Readonly<Record<string, Refusal>>;

/**
 * What the server does about one kind of fact. With the form in `server/contract/kinds` it is all there is to a kind; everything else,
 * from drafts to history, is the same for all.
 */
export type KindModule<K extends FactKind> = {
  readonly kind: K;
  /** What the facts of the kind are chosen by, where they are to belong to another: those of the same maker, model or part type. */
  readonly belongsBy: 'makerId' | 'modelId' | 'partTypeId';
  /** What the fact is called, in words that stand by themselves. */
  readonly titleOf: (payload: PayloadOf<K>, knex: Knex) => Promise<string>;
  /** Whose moderators decide; null: only those of all makers. */
  readonly makerOf: (payload: PayloadOf<K>, knex: Knex) => Promise<string | null>;
  /** Makes the fact's row say the payload: a new row, or the one there is. Answers the slug, where the kind has one. */
  readonly write: (payload: PayloadOf<K>, writing: Writing, trx: Knex.Transaction) => Promise<string | null>;
  /** What it means that the database refuses a row, by the name of the constraint. Paths begin in the payload. */
  readonly refusals: Refusals;
  /** Takes the row away, on retiring; the database refuses where others refer to it. */
  readonly remove: (factId: string, trx: Knex.Transaction) => Promise<void>;
  /** What the record says about it, before a moderator decides. */
  readonly gather: (proposal: Proposal<K>, knex: Knex) => Promise<Findings>;
  /** What rests on it; asked of the payload before and of the one after. */
  readonly restsOn: (payload: PayloadOf<K>, knex: Knex) => Promise<Rests>;
};
