import { z } from 'zod';
import { BySlug, History, Id, listAnswer, listQuery, Named, OpenSpan, Provenance, Slug } from './common.ts';
import { endpoint } from './endpoint.ts';

export const MakerItem = z.object({
  id: Id,
  slug: Slug,
  name: z.string(),
  place: z.string().nullable(),
  buildsMachines: z.boolean(),
  /** Has a foundry: of its own works, or casting for others. */
  poursIron: z.boolean(),
  active: OpenSpan,
  models: z.number().int(),
  castings: z.number().int(),
  ciphers: z.number().int(),
});
export type MakerItem = z.infer<typeof MakerItem>;

export const MakerPage = MakerItem.extend({
  /** How the foundry signed its castings; null for none on record. */
  foundryMark: z.string().nullable(),
  note: z.string().nullable(),
  works: z.array(z.object({ id: Id, slug: Slug, name: z.string(), place: z.string().nullable(), provenance: Provenance })),
  modelList: z.array(Named.extend({ kindOfMachine: z.string(), made: OpenSpan })),
  cipherList: z.array(
    z.object({ slug: Slug, title: z.string(), foundry: Named.nullable(), used: OpenSpan, version: z.number().int() }),
  ),
  /** Makers this foundry poured for; empty for a maker that is no foundry. */
  pouredFor: z.array(Named),
  provenance: Provenance,
});
export type MakerPage = z.infer<typeof MakerPage>;

export const listMakers = endpoint({
  method: 'GET',
  path: '/makers',
  summary: 'Makers and foundries',
  query: listQuery(['name', '-name']),
  answer: listAnswer(MakerItem),
});
export const readMaker = endpoint({
  method: 'GET',
  path: '/makers/:slug',
  summary: 'One maker, its works, models and ciphers',
  params: BySlug,
  answer: MakerPage,
});
export const readMakerHistory = endpoint({
  method: 'GET',
  path: '/makers/:slug/history',
  summary: 'Every version of a maker’s entry',
  params: BySlug,
  answer: History,
});
