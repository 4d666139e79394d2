import type { Knex } from 'knex';
import type { FactKind } from '#domain/vocabulary.ts';
import { Anchor } from '#db/models/anchor.ts';
import { Casting } from '#db/models/casting.ts';
import { Cipher } from '#db/models/cipher.ts';
import { Fact } from '#db/models/fact.ts';
import { FactSource } from '#db/models/fact-source.ts';
import { Fitment } from '#db/models/fitment.ts';
import { MachineModel } from '#db/models/machine-model.ts';
import { Maker } from '#db/models/maker.ts';
import { PartType } from '#db/models/part-type.ts';
import { Position } from '#db/models/position.ts';
import { SerialRange } from '#db/models/serial-range.ts';
import { Series } from '#db/models/series.ts';
import { Source } from '#db/models/source.ts';
import { Supersession } from '#db/models/supersession.ts';
import { Works } from '#db/models/works.ts';
import type { CountedSource } from './list-sources.ts';

/** A fact, by the row that says most about it. */
export type FactOnRecord =
  | { readonly kind: 'maker'; readonly row: Maker }
  | { readonly kind: 'works'; readonly row: Works }
  | { readonly kind: 'model'; readonly row: MachineModel }
  | { readonly kind: 'part-type'; readonly row: PartType }
  | { readonly kind: 'position'; readonly row: Position }
  | { readonly kind: 'casting'; readonly row: Casting }
  | { readonly kind: 'fitment'; readonly row: Fitment }
  | { readonly kind: 'supersession'; readonly row: Supersession }
  | { readonly kind: 'series'; readonly row: Series }
  | { readonly kind: 'serial-range'; readonly row: SerialRange }
  | { readonly kind: 'anchor'; readonly row: Anchor }
  | { readonly kind: 'cipher'; readonly row: Cipher };

export type SourceOnRecord = CountedSource & {
  readonly behind: readonly { readonly fact: FactOnRecord; readonly field: string | null; readonly locator: string | null }[];
};

/** @throws NotFoundError where no source has the slug. */
export async function readSource(slug: string, knex: Knex): Promise<SourceOnRecord> {
  const source = await Source.query(knex).findOne({ slug }).withGraphFetched('member').throwIfNotFound();
  const citations = await FactSource.query(knex).where({ sourceId: source.id });
  const facts = await factsOnRecord(citations.map(({ factId }) => factId), knex);
  return {
    source,
    facts: citations.length,
    behind: citations.flatMap(({ factId, field, locator }) => {
      const fact = facts.get(factId);
      return fact ? [{ fact, field, locator }] : [];
    }),
  };
}

/** The rows of facts of any kind, with what their titles need: a query or three for each kind there is. */
async function factsOnRecord(ids: readonly string[], knex: Knex): Promise<ReadonlyMap<string, FactOnRecord>> {
  const kinds = await Fact.query(knex).findByIds([...ids]);
  const found: FactOnRecord[] = [];
  for (const kind of new Set(kinds.map((fact) => fact.kind))) {
    const ofKind = kinds.filter((fact) => fact.kind === kind).map(({ id }) => id);
    found.push(...(await LOADERS[kind](ofKind, knex)));
  }
  return new Map(found.map((fact) => [fact.row.id, fact]));
}

type Loader = (ids: string[], knex: Knex) => Promise<readonly FactOnRecord[]>;

const LOADERS: Readonly<Record<FactKind, Loader>> = {
  maker: async (ids, knex) => (await Maker.query(knex).findByIds(ids)).map((row) => ({ kind: 'maker', row })),
  works: async (ids, knex) => (await Works.query(knex).findByIds(ids).withGraphFetched('maker')).map((row) => ({ kind: 'works', row })),
  model: async (ids, knex) => (await MachineModel.query(knex).findByIds(ids)).map((row) => ({ kind: 'model', row })),
  'part-type': async (ids, knex) => (await PartType.query(knex).findByIds(ids)).map((row) => ({ kind: 'part-type', row })),
  position: async (ids, knex) =>
    (await Position.query(knex).findByIds(ids).withGraphFetched('model')).map((row) => ({ kind: 'position', row })),
  casting: async (ids, knex) => (await Casting.query(knex).findByIds(ids)).map((row) => ({ kind: 'casting', row })),
  fitment: async (ids, knex) =>
    (await Fitment.query(knex).findByIds(ids).withGraphFetched('[casting, position.model]')).map((row) => ({ kind: 'fitment', row })),
  supersession: async (ids, knex) =>
    (await Supersession.query(knex).findByIds(ids).withGraphFetched('[oldCasting, newCasting]')).map((row) => ({ kind: 'supersession', row })),
  series: async (ids, knex) => (await Series.query(knex).findByIds(ids).withGraphFetched('model')).map((row) => ({ kind: 'series', row })),
  'serial-range': async (ids, knex) =>
    (await SerialRange.query(knex).findByIds(ids).withGraphFetched('series.model')).map((row) => ({ kind: 'serial-range', row })),
  anchor: async (ids, knex) => (await Anchor.query(knex).findByIds(ids).withGraphFetched('series.model')).map((row) => ({ kind: 'anchor', row })),
  cipher: async (ids, knex) => (await Cipher.query(knex).findByIds(ids)).map((row) => ({ kind: 'cipher', row })),
};
