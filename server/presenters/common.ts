import type { FactSource, Named, OpenSpan, Provenance } from '#contract/common.ts';
import type { DateRange } from '#db/ranges.ts';
import type { CitedSource, FactRecord } from '#server/services/fact-records.ts';
import type { Page } from '#server/services/list-page.ts';

/** What a page needs to name and link a thing. */
export function presentNamed({ slug, name }: Named): Named {
  return { slug, name };
}

/** A span that may be unknown altogether: then both its ends are. */
export function presentOpenSpan(range: DateRange | null): OpenSpan {
  return { from: range?.from ?? null, to: range?.to ?? null };
}

/** A span of whole years, as days. */
export function presentYears(first: number | null, last: number | null): OpenSpan {
  return { from: first === null ? null : `${first}-01-01`, to: last === null ? null : `${last}-12-31` };
}

export function presentProvenance({ version, sources }: FactRecord): Provenance {
  return { version: version.number, enteredBy: version.enteredBy, enteredAt: version.enteredAt, sources: sources.map(presentFactSource) };
}

export function presentFactSource({ field, locator, note, source }: CitedSource): FactSource {
  return { field, locator, note, source: { slug: source.slug, kind: source.kind, title: source.title } };
}

/** A page of a list, each item by its own presenter. */
export function presentPage<Row, Item>(
  { items, next, total }: Page<Row>,
  present: (row: Row) => Item,
): { items: Item[]; next: string | null; total?: number } {
  return { items: items.map(present), next, ...(total === undefined ? {} : { total }) };
}
