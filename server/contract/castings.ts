import { z } from 'zod';
import { FITMENT_VERDICTS, INTERCHANGES } from '#domain/vocabulary.ts';
import { BySlug, History, Id, listAnswer, listQuery, Named, OpenSpan, Provenance, Slug, WholeNumber } from './common.ts';
import { MarkText } from './decode.ts';
import { endpoint } from './endpoint.ts';

const CastingRef = z.object({ slug: Slug, number: z.string(), pattern: z.string().nullable() });

export const CastingItem = CastingRef.extend({
  id: Id,
  maker: Named,
  partType: Named,
  /** Years of production; null where nothing is on record. */
  made: OpenSpan.nullable(),
});
export type CastingItem = z.infer<typeof CastingItem>;

const Succession = z.object({
  id: Id,
  casting: CastingRef,
  /** `both-ways`: each fits in place of the other. `new-for-old`: only the newer in place of the older. */
  interchange: z.enum(INTERCHANGES),
  note: z.string().nullable(),
  provenance: Provenance,
});

export const Fitment = z.object({
  id: Id,
  model: Named,
  position: Named,
  prefix: z.string().nullable(),
  first: WholeNumber.nullable(),
  last: WholeNumber.nullable(),
  /** When machines with these serials were built, by the register's reading; null where the ranges don't say. */
  built: OpenSpan.nullable(),
  verdict: z.enum(FITMENT_VERDICTS),
  note: z.string().nullable(),
  provenance: Provenance,
});
export type Fitment = z.infer<typeof Fitment>;

export const CastingPage = CastingItem.extend({
  pouredBy: Named.nullable(),
  note: z.string().nullable(),
  caution: z.string().nullable(),
  partNumbers: z.array(z.object({ number: z.string(), note: z.string().nullable() })),
  tells: z.array(z.object({ place: z.string(), tell: z.string() })),
  fitments: z.array(Fitment),
  follows: z.array(Succession),
  followedBy: z.array(Succession),
  /** Ciphers its date mark may be in: the maker's and, where it was poured elsewhere, the foundry's. */
  ciphers: z.array(z.object({ slug: Slug, title: z.string() })),
  provenance: Provenance,
});
export type CastingPage = z.infer<typeof CastingPage>;

export const listCastings = endpoint({
  method: 'GET',
  path: '/castings',
  summary: 'Castings; `number` takes the mark notation, unreadable glyphs and all',
  query: listQuery(['number', '-number', 'made', '-made'], {
    number: MarkText.optional(),
    maker: Slug.optional(),
    partType: Slug.optional(),
    model: Slug.optional(),
  }),
  answer: listAnswer(CastingItem),
});
export const readCasting = endpoint({
  method: 'GET',
  path: '/castings/:slug',
  summary: 'One casting: what it is, how to tell it, where it belongs',
  params: BySlug,
  answer: CastingPage,
});
export const readCastingHistory = endpoint({
  method: 'GET',
  path: '/castings/:slug/history',
  summary: 'Every version of a casting’s entry',
  params: BySlug,
  answer: History,
});
