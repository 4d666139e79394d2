import { z } from 'zod';
import { parseDay } from '#domain/dates/day.ts';
import { SOURCE_KINDS } from '#domain/vocabulary.ts';
import { LIMITS } from './limits.ts';

export const Slug = z
  .string()
  .max(LIMITS.slug)
  .regex(/^[a-z0-9]+(?:-[a-z0-9]+)*$/, 'Small letters, digits and single hyphens');

export const Id = z.uuid();

/** A calendar day as ISO 8601 text, a real one. */
export const IsoDay = z
  .string()
  .refine((text) => parseDay(text).ok, { error: 'Not a day of the calendar; write it as 1939-07-25', abort: true })
  .meta({ format: 'date', examples: ['1939-07-25'] });

export const DateSpan = z.object({ from: IsoDay, to: IsoDay }).meta({ id: 'DateSpan', description: 'First and last day, both included' });
export type DateSpan = z.infer<typeof DateSpan>;

/** A span either end of which may be unknown or still open. */
export const OpenSpan = z
  .object({ from: IsoDay.nullable(), to: IsoDay.nullable() })
  .meta({ id: 'OpenSpan', description: 'First and last day, both included; null where not known or still open' });
export type OpenSpan = z.infer<typeof OpenSpan>;

/** A whole number too large for JSON numbers to carry safely: serials and range bounds. */
export const WholeNumber = z.string().regex(/^\d{1,19}$/);

/** `?q=&sort=&limit=&after=`, the same for every list; `sorts` are the orders that list knows, the first its own. */
export function listQuery<const Sorts extends readonly [string, ...string[]], Extra extends z.ZodRawShape = Record<never, never>>(
  sorts: Sorts,
  extra?: Extra,
) {
  return z.strictObject({
    q: z.string().trim().max(LIMITS.query).optional(),
    sort: z.enum(sorts).default(sorts[0] as Sorts[number]),
    limit: z.coerce.number().int().min(1).max(LIMITS.page.most).default(LIMITS.page.usual),
    after: z.string().max(LIMITS.cursor).optional(),
    ...(extra ?? ({} as Extra)),
  });
}

/** A page of a list; `next` is the cursor to send as `after`, null on the last page. */
export function listAnswer<Item extends z.ZodType>(item: Item) {
  return z.object({ items: z.array(item), next: z.string().nullable(), total: z.number().int().optional() });
}

export const BySlug = z.strictObject({ slug: Slug });

/** What a page needs to name and link a thing. */
export const Named = z.object({ slug: Slug, name: z.string() }).meta({ id: 'Named' });
export type Named = z.infer<typeof Named>;

export const SourceKind = z.enum(SOURCE_KINDS);
export type SourceKind = z.infer<typeof SourceKind>;

/** A source behind a fact, as the margin shows it. `field` names the part of the fact it stands behind; null = all of it. */
export const FactSource = z
  .object({
    field: z.string().nullable(),
    source: z.object({ slug: Slug, kind: SourceKind, title: z.string() }),
    locator: z.string().nullable(),
    note: z.string().nullable(),
  })
  .meta({ id: 'FactSource' });
export type FactSource = z.infer<typeof FactSource>;

/** Who entered a fact, when, in which version, and what stands behind it. */
export const Provenance = z
  .object({
    version: z.number().int().positive(),
    enteredBy: z.string(),
    enteredAt: z.iso.datetime({ offset: true }),
    sources: z.array(FactSource),
  })
  .meta({ id: 'Provenance' });
export type Provenance = z.infer<typeof Provenance>;

/** One version of a fact, newest first in a history. `payload` is the fact as it stood. */
export const HistoryEntry = z.object({
  version: z.number().int().positive(),
  enteredBy: z.string(),
  enteredAt: z.iso.datetime({ offset: true }),
  reason: z.string(),
  inForce: z.boolean(),
  payload: z.record(z.string(), z.json()),
});
export type HistoryEntry = z.infer<typeof HistoryEntry>;
export const History = z.object({ items: z.array(HistoryEntry) }).meta({ id: 'History' });
export type History = z.infer<typeof History>;
