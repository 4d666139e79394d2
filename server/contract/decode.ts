import { z } from 'zod';
import { DECODE_STATUSES, PRECISIONS, REASON_CODES } from '#domain/ciphers/decoding.ts';
import { FIELD_KINDS } from '#domain/ciphers/definition.ts';
import { parseReading } from '#domain/marks/reading.ts';
import { CipherDefinitionSchema } from './cipher.ts';
import { Id, IsoDay, Slug } from './common.ts';
import { endpoint } from './endpoint.ts';
import { LIMITS } from './limits.ts';

/** A reading in the mark notation; a fault names the character and its place. */
export const MarkText = z
  .string()
  .min(1, { error: 'Type the mark as you see it', abort: true })
  .max(LIMITS.mark, { error: 'A mark has at most 32 glyphs', abort: true })
  .superRefine((text, context) => {
    const reading = parseReading(text);
    if (!reading.ok) context.addIssue({ code: 'custom', message: reading.fault.message });
  })
  .meta({ examples: ['B?[OD]CB'] });

const Limits = z
  .strictObject({ from: IsoDay.optional(), to: IsoDay.optional() })
  .refine(({ from, to }) => from === undefined || to === undefined || from <= to, { path: ['to'], error: 'The last day is before the first' });

export const DecodeRequest = z
  .strictObject({
    mark: MarkText,
    cipher: CipherDefinitionSchema.optional(),
    cipherId: Id.optional(),
    makerId: Id.optional(),
    limits: Limits.optional(),
    lookAlikes: z.boolean().default(false),
    asOf: IsoDay.optional(),
  })
  .refine(
    (request) => [request.cipher, request.cipherId, request.makerId].filter((one) => one !== undefined).length <= 1,
    { path: ['cipher'], error: 'Give a cipher, a cipherId or a makerId, not several' },
  );

const Share = z.number().min(0).max(1);

export const CandidateAnswer = z.object({
  from: IsoDay,
  to: IsoDay,
  precision: z.enum(PRECISIONS),
  share: Share,
  spans: z.array(
    z.object({
      field: z.enum(FIELD_KINDS),
      start: z.number().int(),
      end: z.number().int(),
      text: z.string(),
      value: z.number().nullable(),
    }),
  ),
  details: z.record(z.string(), z.string()),
});
export type CandidateAnswer = z.infer<typeof CandidateAnswer>;

/** A stored cipher as an answer names it. */
const CipherRef = z.object({ id: Id, slug: Slug, title: z.string(), makerId: Id, version: z.number().int() });

export const DecodeResult = z.object({
  cipher: CipherRef.nullable(),
  status: z.enum(DECODE_STATUSES),
  total: z.number().int(),
  candidates: z.array(CandidateAnswer),
  reasons: z.array(z.object({ code: z.enum(REASON_CODES), message: z.string() })),
  settle: z.array(z.object({ position: z.number().int(), bits: z.number() })),
  splits: z.array(z.object({ after: z.number().int(), bits: z.number() })),
  /** Likelihood of the reading averaged over the days in use; what the results are ranked by. */
  likelihood: z.number(),
  /** The days the cipher was in use, for the rule; `to` null = still in use. */
  used: z.object({ from: IsoDay, to: IsoDay.nullable() }),
});
export type DecodeResult = z.infer<typeof DecodeResult>;

const GLYPH_KINDS = ['sure', 'oneOf', 'unread', 'run'] as const;

export const DecodeAnswer = z.object({
  glyphs: z.array(z.object({ position: z.number().int(), kind: z.enum(GLYPH_KINDS), glyphs: z.array(z.string()) })),
  breaks: z.array(z.number().int()),
  results: z.array(DecodeResult),
  triedCiphers: z.number().int(),
  /** Ciphers that can make the mark; `results` lists the first 50. */
  matchedCiphers: z.number().int(),
});
export type DecodeAnswer = z.infer<typeof DecodeAnswer>;

export const decodeMark = endpoint({
  method: 'POST',
  path: '/decode',
  summary: 'Every date a mark can mean, under one cipher, a maker’s ciphers, a definition of your own, or all on record',
  body: DecodeRequest,
  answer: DecodeAnswer,
});
