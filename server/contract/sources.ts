import { z } from 'zod';
import { FACT_KINDS } from '#domain/vocabulary.ts';
import { BySlug, History, Id, listAnswer, listQuery, Slug, SourceKind } from './common.ts';
import { endpoint } from './endpoint.ts';

export const SourceItem = z.object({ id: Id, slug: Slug, kind: SourceKind, title: z.string(), facts: z.number().int() });
export type SourceItem = z.infer<typeof SourceItem>;

export const SourcePage = SourceItem.extend({
  /** The kind's own fields, in the order to show them. */
  details: z.array(z.object({ name: z.string(), value: z.string() })),
  note: z.string().nullable(),
  /** What it stands behind; `slug` is null where a fact has no page of its own. */
  behind: z.array(
    z.object({ kind: z.enum(FACT_KINDS), slug: Slug.nullable(), title: z.string(), field: z.string().nullable(), locator: z.string().nullable() }),
  ),
});
export type SourcePage = z.infer<typeof SourcePage>;

export const listSources = endpoint({
  method: 'GET',
  path: '/sources',
  summary: 'Sources',
  query: listQuery(['title', '-title'], { kind: SourceKind.optional() }),
  answer: listAnswer(SourceItem),
});
export const readSource = endpoint({
  method: 'GET',
  path: '/sources/:slug',
  summary: 'One source and the facts it stands behind',
  params: BySlug,
  answer: SourcePage,
});
export const readSourceHistory = endpoint({
  method: 'GET',
  path: '/sources/:slug/history',
  summary: 'Every version of a source’s entry',
  params: BySlug,
  answer: History,
});
