import type { SourceKind } from '#contract/common.ts';
import type { LoosePayload } from '#contract/contributions.ts';
import type { FactField } from '#contract/kinds/kind.ts';
import { SOURCE_KINDS } from '#domain/vocabulary.ts';
import { blankOf } from './draft-values.ts';

const TITLE: FactField = { key: 'title', label: 'Title', control: 'line' };
const AUTHOR: FactField = { key: 'author', label: 'Author', control: 'line', optional: true };
const YEAR: FactField = { key: 'year', label: 'Year', control: 'number', optional: true };
const NOTE: FactField = { key: 'note', label: 'About the source', control: 'prose', optional: true };
const DAY = { key: 'dated', label: 'Day', hint: 'As 1939-07-25', control: 'line' } as const;

/** What is asked about a source the register does not have yet, kind by kind. */
const SOURCE_FIELDS: Readonly<Record<SourceKind, readonly FactField[]>> = {
  book: [TITLE, AUTHOR, { key: 'publisher', label: 'Publisher', control: 'line', optional: true }, YEAR, NOTE],
  drawing: [
    TITLE,
    { key: 'drawingNumber', label: 'Drawing number', control: 'line', mono: true },
    { key: 'sheet', label: 'Sheet', control: 'line', optional: true },
    YEAR,
    NOTE,
  ],
  plate: [TITLE, { key: 'subject', label: 'What it is on', control: 'line' }, YEAR, NOTE],
  photo: [TITLE, { key: 'subject', label: 'What it shows', control: 'line' }, { ...AUTHOR, label: 'Taken by' }, { ...DAY, optional: true }, NOTE],
  sighting: [TITLE, { key: 'subject', label: 'What you saw', hint: 'Which part or machine, and where', control: 'line' }, DAY, NOTE],
  correspondence: [TITLE, { ...AUTHOR, label: 'From' }, { key: 'addressee', label: 'To', control: 'line', optional: true }, { ...DAY, optional: true }, NOTE],
  'own-knowledge': [TITLE, { key: 'note', label: 'How you know', control: 'prose' }],
};

export function fieldsOfSource(kind: SourceKind): readonly FactField[] {
  return SOURCE_FIELDS[kind];
}

export function kindOfSource(source: LoosePayload): SourceKind {
  return SOURCE_KINDS.find((kind) => kind === source['kind']) ?? 'book';
}

/** A source of a kind; what was said of it before is kept where the kind has a place for it. */
export function sourceOfKind(kind: SourceKind, said: LoosePayload): LoosePayload {
  return { kind, ...Object.fromEntries(SOURCE_FIELDS[kind].map((field) => [field.key, said[field.key] ?? blankOf(field)])) };
}

/** Where in a source: what its kind calls the place. */
export function sayLocator(kind: SourceKind | null): string {
  return kind === 'book' ? 'Page' : kind === 'drawing' ? 'Where on the sheet' : 'Where in it';
}
