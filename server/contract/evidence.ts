import { z } from 'zod';
import { FACT_KINDS } from '#domain/vocabulary.ts';
import { Id, Slug } from './common.ts';

/** What the record says about a contribution. Facts, with no verdict: the moderator decides. */

/** Where a line of evidence leads; a mark is named by its id, the rest by slug. */
export const EvidenceSubject = z.union([
  z.object({ kind: z.literal('mark'), id: Id, title: z.string() }),
  z.object({ kind: z.enum(FACT_KINDS), id: Id, slug: Slug.nullable(), title: z.string() }),
]);
export type EvidenceSubject = z.infer<typeof EvidenceSubject>;

export const EvidenceItem = z.object({
  subject: EvidenceSubject.nullable(),
  /** A reading, in the mark notation, where the line is about one. */
  mark: z.string().nullable(),
  /** What is to be seen, in a sentence or less. */
  text: z.string(),
});
export type EvidenceItem = z.infer<typeof EvidenceItem>;

export const EvidenceGroup = z.object({
  /** Names the group for good: `dates`, `overlaps`. */
  code: z.string(),
  title: z.string(),
  count: z.number().int(),
  /** Out of how many; null where there is no whole. */
  of: z.number().int().nullable(),
  /** The first of them; those on parts that are not public are counted and not listed. */
  items: z.array(EvidenceItem),
  unlisted: z.number().int(),
});
export type EvidenceGroup = z.infer<typeof EvidenceGroup>;

/** A single number with how it came about, as the share of agreement that chance alone would give. */
export const EvidenceFigure = z.object({ code: z.string(), name: z.string(), value: z.number(), unit: z.enum(['share', 'count', 'days']), working: z.string() });
export type EvidenceFigure = z.infer<typeof EvidenceFigure>;

export const Findings = z.object({ groups: z.array(EvidenceGroup), figures: z.array(EvidenceFigure) });
export type Findings = z.infer<typeof Findings>;

export const Evidence = Findings.extend({
  id: Id,
  gatheredAt: z.iso.datetime({ offset: true }),
  /** `put-forward`: when its author put it forward; `opened`: when a moderator opened it. */
  occasion: z.enum(['put-forward', 'opened']),
  revision: z.number().int(),
}).meta({ id: 'Evidence' });
export type Evidence = z.infer<typeof Evidence>;
