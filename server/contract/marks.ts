import { z } from 'zod';
import { MARK_KINDS, MARK_TECHNIQUES } from '#domain/vocabulary.ts';
import { DateSpan, Id, Named } from './common.ts';
import { FactRef } from './contributions.ts';
import { endpoint } from './endpoint.ts';

/** A mark on record, as anybody may see it: what stands on a public part. */
export const MarkPage = z.object({
  id: Id,
  kind: z.enum(MARK_KINDS),
  technique: z.enum(MARK_TECHNIQUES),
  /** The register's reading; null while nobody has read it. */
  reading: z.string().nullable(),
  readings: z.array(z.object({ text: z.string(), by: z.string(), at: z.iso.datetime({ offset: true }) })),
  maker: Named.nullable(),
  casting: FactRef.nullable(),
  /** The machine it was found on; its serial is masked unless its owner shows it. */
  machine: z.object({ model: Named, serial: z.string() }).nullable(),
  /** What it was worked out to mean; null for a mark that is no date, and while it is being worked out again. */
  dates: z
    .object({
      status: z.enum(['dated', 'several', 'none']),
      cipher: FactRef.nullable(),
      cipherVersion: z.number().int().nullable(),
      candidates: z.array(DateSpan.extend({ share: z.number() })),
      total: z.number().int(),
    })
    .nullable(),
  workingOut: z.boolean(),
});
export type MarkPage = z.infer<typeof MarkPage>;

export const readMark = endpoint({
  method: 'GET',
  path: '/marks/:id',
  summary: 'A mark on record and what it was worked out to mean',
  params: z.strictObject({ id: Id }),
  answer: MarkPage,
});
