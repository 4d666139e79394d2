import { z } from 'zod';
import { MEASURE_UNITS, WEAR_DIRECTIONS } from '#domain/vocabulary.ts';
import { BySlug, History, Id, listAnswer, listQuery, Named, Provenance, Slug } from './common.ts';
import { endpoint } from './endpoint.ts';

export const PartTypeItem = z.object({ id: Id, slug: Slug, name: z.string(), castings: z.number().int() });
export type PartTypeItem = z.infer<typeof PartTypeItem>;

/** How far a measure of such a part may wear. */
const WearLimit = z.object({
  id: Id,
  /** Null: on every model. */
  model: Named.nullable(),
  measure: z.string(),
  unit: z.enum(MEASURE_UNITS),
  /** Smallest and largest of a new part; null where nobody says. */
  asBuilt: z.object({ from: z.number(), to: z.number().nullable() }).nullable(),
  direction: z.enum(WEAR_DIRECTIONS),
  limit: z.number(),
  method: z.string().nullable(),
  note: z.string().nullable(),
  provenance: Provenance,
});
export type WearLimit = z.infer<typeof WearLimit>;

export const PartTypePage = PartTypeItem.extend({
  note: z.string().nullable(),
  caution: z.string().nullable(),
  models: z.array(Named),
  wearLimits: z.array(WearLimit),
  provenance: Provenance,
});
export type PartTypePage = z.infer<typeof PartTypePage>;

export const listPartTypes = endpoint({
  method: 'GET',
  path: '/part-types',
  summary: 'Kinds of part',
  query: listQuery(['name', '-name']),
  answer: listAnswer(PartTypeItem),
});
export const readPartType = endpoint({
  method: 'GET',
  path: '/part-types/:slug',
  summary: 'One kind of part',
  params: BySlug,
  answer: PartTypePage,
});
export const readPartTypeHistory = endpoint({
  method: 'GET',
  path: '/part-types/:slug/history',
  summary: 'Every version of a part type’s entry',
  params: BySlug,
  answer: History,
});
