import type { LoosePayload } from '#contract/contributions.ts';
import { capital } from '../../lib/say-number.ts';
import { saySourceKind } from '../sources/say-source.ts';
import { objectOf, textOf } from './draft-values.ts';
import { fieldsOfSource, kindOfSource } from './source-fields.ts';

export type CitationNote = {
  readonly number: number;
  /** The field it stands behind, with its row; null: all of it. */
  readonly field: string | null;
  /** Null where nothing was chosen yet. */
  readonly title: string | null;
  /** Null for a source the register gets with this contribution. */
  readonly slug: string | null;
  readonly locator: string | null;
  readonly remark: string | null;
  /** What a new source says of itself: `Book, 1938, by R. Hale`. */
  readonly about: string | null;
};

type Known = readonly { readonly id: string; readonly slug: string; readonly title: string }[];

/** The sources of a contribution as notes for the margin, numbered in the order they were cited. */
export function citationNotes(citations: readonly LoosePayload[], sources: Known): readonly CitationNote[] {
  return citations.map((citation, place) => {
    const fresh = objectOf(citation['newSource']);
    const known = sources.find(({ id }) => id === citation['sourceId']);
    return {
      number: place + 1,
      field: said(citation['field']),
      title: fresh === null ? (known?.title ?? null) : said(fresh['title']),
      slug: fresh === null ? (known?.slug ?? null) : null,
      locator: said(citation['locator']),
      remark: said(citation['note']),
      about: fresh === null ? null : aboutSource(fresh),
    };
  });
}

function aboutSource(source: LoosePayload): string {
  const kind = kindOfSource(source);
  const details = fieldsOfSource(kind).flatMap(({ key, label }) => {
    const text = said(source[key]);
    return key === 'title' || text === null ? [] : [`${label.toLowerCase()}: ${text}`];
  });
  const told = capital([`New with this: ${saySourceKind(kind)}`, ...details].join('; '));
  return told.endsWith('.') ? told : `${told}.`;
}

/** The numbers of the notes that name a field, or a row of it. */
export function notesBehind(notes: readonly CitationNote[], field: string): readonly number[] {
  const own = notes.filter((note) => note.field === field || note.field?.startsWith(`${field}.`));
  return own.map(({ number }) => number);
}

function said(value: LoosePayload[string] | undefined): string | null {
  const text = textOf(value);
  return text === '' ? null : text;
}
