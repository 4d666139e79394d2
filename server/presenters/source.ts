import type { SourceItem, SourcePage } from '#contract/sources.ts';
import type { Casting } from '#db/models/casting.ts';
import type { Series } from '#db/models/series.ts';
import type { Source } from '#db/models/source.ts';
import type { CountedSource } from '#server/services/list-sources.ts';
import type { FactOnRecord, SourceOnRecord } from '#server/services/read-source.ts';
import { loaded } from './loaded.ts';

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
      .map(({ fact, field, locator }): Behind => ({ kind: fact.kind, ...titleOf(fact), field, locator }))
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

/** What to call a fact in a list, and its page where it has one of its own. */
function titleOf(fact: FactOnRecord): Pick<Behind, 'slug' | 'title'> {
  switch (fact.kind) {
    case 'maker':
    case 'model':
    case 'part-type':
      return { slug: fact.row.slug, title: fact.row.name };
    case 'works':
      return { slug: null, title: `${loaded(fact.row.maker).name}, ${fact.row.name}` };
    case 'position':
      return { slug: null, title: `${loaded(fact.row.model).name}, ${fact.row.name}` };
    case 'casting':
      return { slug: fact.row.slug, title: castingTitle(fact.row) };
    case 'fitment': {
      const position = loaded(fact.row.position);
      return { slug: null, title: `${castingTitle(loaded(fact.row.casting))} on ${loaded(position.model).name}, ${position.name}` };
    }
    case 'supersession':
      return { slug: null, title: `${castingTitle(loaded(fact.row.oldCasting))} followed by ${castingTitle(loaded(fact.row.newCasting))}` };
    case 'series':
      return { slug: null, title: seriesTitle(fact.row) };
    case 'serial-range': {
      const { slug, numbers, series } = fact.row;
      return { slug, title: `${seriesTitle(loaded(series))}, ${numbers.from} to ${numbers.to ?? 'the last'}` };
    }
    case 'anchor':
      return { slug: null, title: `${seriesTitle(loaded(fact.row.series))}, ${fact.row.number}` };
    case 'cipher':
      return { slug: fact.row.slug, title: fact.row.title };
  }
}

function castingTitle({ number, pattern }: Casting): string {
  return pattern === null ? number : `${number} (${pattern})`;
}

function seriesTitle(series: Series): string {
  return [loaded(series.model).name, series.prefix, series.label].filter((part) => part !== null && part !== '').join(' ');
}

function sortText({ kind, title, field, locator }: Behind): string {
  return [kind, title, field ?? '', locator ?? ''].join('\n');
}

function compareText(one: string, other: string): number {
  return one < other ? -1 : one > other ? 1 : 0;
}
