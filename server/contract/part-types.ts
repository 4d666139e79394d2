import { z } from 'zod';
import { BySlug, History, Id, listAnswer, listQuery, Named, Provenance, Slug } from './common.ts';
import { endpoint } from './endpoint.ts';

export const PartTypeItem = z.object({ id: Id, slug: Slug, name: z.string(), castings: z.number().int() });
export type PartTypeItem = z.infer<typeof PartTypeItem>;

export const PartTypePage = PartTypeItem.extend({
  note: z.string().nullable(),
  caution: z.string().nullable(),
  models: z.array(Named),
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
