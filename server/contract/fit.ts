import { z } from 'zod';
import { FIT_VERDICTS } from '#domain/fit/fit.ts';
import { IsoDay } from './common.ts';
import { endpoint } from './endpoint.ts';
import { LIMITS } from './limits.ts';

const Days = z.int().min(0, 'A lead counts days from casting to assembly, so it is never negative').max(LIMITS.lead);

/** Accepted lead in days; `most` null = open. */
export const Lead = z
  .strictObject({ least: Days, most: Days.nullable() })
  .refine(({ least, most }) => most === null || least <= most, { path: ['most'], error: 'The most is less than the least' });

const OrderedSpan = z
  .strictObject({ from: IsoDay, to: IsoDay })
  .refine(({ from, to }) => from <= to, { path: ['to'], error: 'The last day is before the first' });

const WeighedSpan = z
  .strictObject({ from: IsoDay, to: IsoDay, share: z.number().positive().max(1) })
  .refine(({ from, to }) => from <= to, { path: ['to'], error: 'The last day is before the first' });

export const FitRequest = z.strictObject({
  candidates: z.array(WeighedSpan).min(1).max(LIMITS.candidates),
  build: OrderedSpan,
  lead: Lead.optional(),
});

const Figures = { late: z.number(), in: z.number(), early: z.number() };

export const FitAnswer = z.object({
  ...Figures,
  verdict: z.enum(FIT_VERDICTS),
  /** False when no sourced lead was given: then any lead from 0 days is accepted and "older stock" is never said. */
  leadOnRecord: z.boolean(),
  lead: z.object({ least: z.number().int(), most: z.number().int().nullable() }),
  /** The same for each candidate, in the order given; lead days at the least and at the most. */
  candidates: z.array(
    z.object({
      from: IsoDay,
      to: IsoDay,
      share: z.number(),
      ...Figures,
      verdict: z.enum(FIT_VERDICTS),
      leadDays: z.object({ least: z.number().int(), most: z.number().int() }),
      /** Whether its share is large enough for a say in the verdict. */
      counts: z.boolean(),
    }),
  ),
  /** What the verdict would be if the date turned out to be one of these candidates (places in `candidates`); empty unless unsettled. */
  wouldSettle: z.array(z.object({ verdict: z.enum(FIT_VERDICTS), share: z.number(), candidates: z.array(z.number().int()) })),
});
export type FitAnswer = z.infer<typeof FitAnswer>;

export const judgeFitOfPart = endpoint({
  method: 'POST',
  path: '/fit',
  summary: 'Whether a part cast on these dates belongs on a machine built in this window',
  body: FitRequest,
  answer: FitAnswer,
});
