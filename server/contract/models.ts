import { z } from 'zod';
import { SERIAL_STANDINGS } from '#domain/serials/build-window.ts';
import { BySlug, DateSpan, FactSource, History, Id, IsoDay, listAnswer, listQuery, Named, OpenSpan, Provenance, Slug, WholeNumber } from './common.ts';
import { endpoint } from './endpoint.ts';
import { Lead } from './fit.ts';
import { LIMITS } from './limits.ts';
import { AccountRef, SerialRangeItem, SeriesRef } from './serial-ranges.ts';

export const ModelItem = z.object({
  id: Id,
  slug: Slug,
  name: z.string(),
  maker: Named,
  kindOfMachine: z.string(),
  made: OpenSpan,
});
export type ModelItem = z.infer<typeof ModelItem>;

/** One row of a model's checklist. */
export const Position = z.object({
  id: Id,
  slug: Slug,
  name: z.string(),
  partType: Named,
  weight: z.number().positive(),
  /** Accepted lead in days with its source; null where none is on record. */
  lead: Lead.nullable(),
  /** The caution the part type carries (pressure, lifting, asbestos…), in words for the screen; null for none. */
  caution: z.string().nullable(),
  castings: z.array(z.object({ slug: Slug, number: z.string(), pattern: z.string().nullable() })),
  provenance: Provenance,
});
export type Position = z.infer<typeof Position>;

const Anchor = z.object({ id: Id, number: WholeNumber, built: DateSpan, provenance: Provenance });

export const ModelPage = ModelItem.extend({
  note: z.string().nullable(),
  positions: z.array(Position),
  series: z.array(
    SeriesRef.extend({
      provenance: Provenance,
      ranges: z.array(SerialRangeItem.extend({ provenance: Provenance })),
      anchors: z.array(Anchor),
    }),
  ),
  provenance: Provenance,
});
export type ModelPage = z.infer<typeof ModelPage>;

export const listModels = endpoint({
  method: 'GET',
  path: '/models',
  summary: 'Models of machine',
  query: listQuery(['name', '-name', 'maker'], { maker: Slug.optional() }),
  answer: listAnswer(ModelItem),
});
export const readModel = endpoint({
  method: 'GET',
  path: '/models/:slug',
  summary: 'One model: its checklist, series and serial ranges',
  params: BySlug,
  answer: ModelPage,
});
export const readModelHistory = endpoint({
  method: 'GET',
  path: '/models/:slug/history',
  summary: 'Every version of a model’s entry',
  params: BySlug,
  answer: History,
});

const RangeHeld = SerialRangeItem.omit({ model: true, series: true, account: true, preferred: true });

const Placing = {
  window: DateSpan.nullable(),
  /** Only where the numbers were issued in order; shown with its window, never alone. */
  likely: z.object({ day: IsoDay, from: IsoDay, to: IsoDay }).nullable(),
  range: RangeHeld.nullable(),
  standing: z.enum(SERIAL_STANDINGS),
  /** The ranges on either side of a number that none holds. */
  neighbours: z.array(RangeHeld),
  sources: z.array(FactSource),
};

export const BuildAnswer = z.object({
  serial: z.object({
    asStamped: z.string(),
    prefix: z.string(),
    number: WholeNumber,
    suffix: z.string(),
    /** Glyphs taken for another to make the number readable: O for 0, I for 1. */
    substitutions: z.array(z.object({ at: z.number().int(), seen: z.string(), taken: z.string() })),
  }),
  /** The register's reading: the first of `accounts`, or nothing known. */
  ...Placing,
  /** Every account of every series that may hold the number; rivals stand side by side, the register's reading first. */
  accounts: z.array(z.object({ series: SeriesRef, account: AccountRef, preferred: z.boolean(), ...Placing })),
  /** Other models whose series read alike and hold the number. */
  readsAlike: z.array(z.object({ model: Named, series: SeriesRef, window: DateSpan })),
});
export type BuildAnswer = z.infer<typeof BuildAnswer>;

export const readBuild = endpoint({
  method: 'GET',
  path: '/models/:slug/build',
  summary: 'When a machine was built, from its serial as stamped',
  params: BySlug,
  query: z.strictObject({ serial: z.string().trim().min(1, 'Type the serial as stamped').max(LIMITS.serial) }),
  answer: BuildAnswer,
});
