import { z } from 'zod';
import { BySlug, History, Id, listAnswer, listQuery, Named, OpenSpan, Provenance, Slug } from './common.ts';
import { CipherDefinitionSchema } from './cipher.ts';
import { endpoint } from './endpoint.ts';

export const CipherItem = z.object({
  id: Id,
  slug: Slug,
  title: z.string(),
  maker: Named,
  /** The foundry that poured under this cipher, where it is not the maker's own. */
  foundry: Named.nullable(),
  kindOfMachine: z.string().nullable(),
  used: OpenSpan,
  version: z.number().int(),
});
export type CipherItem = z.infer<typeof CipherItem>;

export const CipherPage = CipherItem.extend({
  definition: CipherDefinitionSchema,
  note: z.string().nullable(),
  provenance: Provenance,
});
export type CipherPage = z.infer<typeof CipherPage>;

export const listCiphers = endpoint({
  method: 'GET',
  path: '/ciphers',
  summary: 'Ciphers in force',
  query: listQuery(['title', '-title', 'used'], { maker: Slug.optional() }),
  answer: listAnswer(CipherItem),
});
export const readCipher = endpoint({
  method: 'GET',
  path: '/ciphers/:slug',
  summary: 'One cipher with its definition in force',
  params: BySlug,
  answer: CipherPage,
});
export const readCipherHistory = endpoint({
  method: 'GET',
  path: '/ciphers/:slug/history',
  summary: 'Every version of a cipher',
  params: BySlug,
  answer: History,
});
