import type { SourceItem, SourcePage } from '#contract/sources.ts';
import type { Source } from '#db/models/source.ts';
import type { CountedSource } from '#server/services/list-sources.ts';
import type { SourceOnRecord } from '#server/services/read-source.ts';

type Behind = SourcePage['behind'][number];

export function presentSourceItem({ source, facts }: CountedSource): SourceItem {
  return { id: source.id, slug: source.slug, kind: source.kind, title: source.title, facts };
}

export function presentSource(onRecord: SourceOnRecord): SourcePage {
  const { source, behind } = onRecord;
  return {
    ...presentSourceItem(onRecord),
    details: presentSourceDetails(source),
    note: source.note,
    behind: behind
      .map(({ fact: { kind, slug, title }, field, locator }): Behind => ({ kind, slug, title, field, locator }))
      .toSorted((one, other) => compareText(sortText(one), sortText(other))),
  };
}

/** The kind's own fields in the order to show them; a source lacks those its kind has no use for. */
export function presentSourceDetails(source: Source): SourcePage['details'] {
  const fields: readonly (readonly [name: string, value: string | number | null | undefined])[] = [
    ['Author', source.author],
    ['Publisher', source.publisher],
    ['Year', source.year],
    ['Drawing', source.drawingNumber],
    ['Sheet', source.sheet],
    ['Of', source.subject],
    ['To', source.addressee],
    ['Dated', source.dated],
    ['Member', source.member?.displayName],
  ];
  return fields.flatMap(([name, value]) => (value === null || value === undefined ? [] : [{ name, value: String(value) }]));
}

function sortText({ kind, title, field, locator }: Behind): string {
  return [kind, title, field ?? '', locator ?? ''].join('\n');
}

function compareText(one: string, other: string): number {
  return one < other ? -1 : one > other ? 1 : 0;
}
