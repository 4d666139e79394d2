import { describe, expect, it } from 'vitest';
import type { FactSource, Provenance } from '#contract/common.ts';
import { bySource, pageNotes, provenanceOfField } from '#client/pages/catalogue/page-notes.ts';

const cited = (slug: string, field: string | null = null, locator: string | null = null): FactSource => ({
  field,
  source: { slug, kind: 'book', title: slug },
  locator,
  note: null,
});
const entered = (sources: FactSource[], enteredBy = 'Harrow Lane', enteredAt = '2026-03-04T10:00:00Z'): Provenance => ({
  version: 1,
  enteredBy,
  enteredAt,
  sources,
});

describe('pageNotes', () => {
  it('numbers sources from the top of the page and gives each its block', () => {
    const notes = pageNotes([
      { block: 'what', facts: [{ key: 'made', provenance: entered([cited('book'), cited('plate')]) }] },
      { block: 'where', facts: [{ key: 'fitment', provenance: entered([cited('letter')]) }] },
    ]);
    expect(notes.numbersOf('made')).toEqual([1, 2]);
    expect(notes.numbersOf('fitment')).toEqual([3]);
    expect(notes.beside('where').map(({ number, source }) => [number, source?.source.slug])).toEqual([[3, 'letter']]);
  });
  it('says one source once, beside the block that points to it first', () => {
    const notes = pageNotes([
      { block: 'what', facts: [{ key: 'made', provenance: entered([cited('book', 'made', 'page 3')]) }] },
      { block: 'tells', facts: [{ key: 'tell', provenance: entered([cited('book', 'tells', 'page 3')]) }] },
    ]);
    expect(notes.numbersOf('tell')).toEqual([1]);
    expect(notes.beside('tells')).toEqual([]);
  });
  it.each([
    ['another member entered it', entered([cited('book')], 'Two Valleys club')],
    ['it was entered another day', entered([cited('book')], 'Harrow Lane', '2026-03-05T10:00:00Z')],
    ['it stands at another place', entered([cited('book', null, 'page 9')])],
  ])('keeps notes apart where %s', (_, other) => {
    const notes = pageNotes([
      {
        block: 'what',
        facts: [
          { key: 'one', provenance: entered([cited('book')]) },
          { key: 'other', provenance: other },
        ],
      },
    ]);
    expect(notes.numbersOf('other')).toEqual([2]);
  });
  it('has a note even for a fact without a source', () => {
    const notes = pageNotes([{ block: 'what', facts: [{ key: 'made', provenance: entered([]) }] }]);
    expect(notes.beside('what')).toEqual([
      { number: 1, source: null, version: 1, enteredBy: 'Harrow Lane', enteredAt: '2026-03-04T10:00:00Z' },
    ]);
  });
  it('has no numbers for a fact that was not given', () => {
    expect(pageNotes([]).numbersOf('made')).toEqual([]);
  });
});

describe('provenanceOfField', () => {
  const provenance = entered([cited('book'), cited('drawing', 'made'), cited('sighting', 'tells'), cited('letter', 'tells.2')]);
  const slugs = (field: string) => provenanceOfField(provenance, field).sources.map(({ source }) => source.slug);
  it('takes the sources that name the field', () => {
    expect(slugs('made')).toEqual(['drawing']);
  });
  it('lets a source of the list stand behind each of its entries', () => {
    expect(slugs('tells.1')).toEqual(['sighting']);
    expect(slugs('tells.2')).toEqual(['sighting', 'letter']);
  });
  it('falls back on those behind the whole, and never on those of another field', () => {
    expect(slugs('note')).toEqual(['book']);
  });
});

describe('bySource', () => {
  it('puts the notes of one source together, in the order they are met', () => {
    const notes = pageNotes([
      {
        block: 'what',
        facts: ['a', 'b', 'a'].map((slug, place) => ({
          key: String(place),
          provenance: entered([cited(slug, null, `page ${place}`)]),
        })),
      },
    ]).beside('what');
    expect(bySource(notes).map((group) => group.map(({ number }) => number))).toEqual([[1, 3], [2]]);
  });
});
