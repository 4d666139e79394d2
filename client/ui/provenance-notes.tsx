import { Link } from 'react-router-dom';
import type { FactSource, Provenance } from '#contract/common.ts';
import { paths } from '../lib/paths.ts';
import { sayMoment } from '../lib/say-date.ts';
import { capital } from '../lib/say-number.ts';
import type { Note } from './margin-notes.tsx';

/** A fact on the page and where it comes from. */
export type SourcedFact = { readonly key: string; readonly provenance: Provenance };

export type ProvenanceNotes = {
  readonly notes: readonly Note[];
  /** The numbers a fact's `NoteRef` shows. */
  readonly numbersOf: (key: string) => readonly number[];
};

/**
 * Numbers the sources behind a page's facts, each said once however many facts it stands behind, in the order they are met.
 * A fact without a source gets a note that says so. `from` is the first number to give.
 */
export function provenanceNotes(facts: readonly SourcedFact[], from = 1): ProvenanceNotes {
  const notes = new Map<string, Note>();
  const numbers = new Map<string, number[]>();
  for (const { key, provenance } of facts) {
    const entered = `Entered by ${provenance.enteredBy}, ${sayMoment(provenance.enteredAt)}. Version ${provenance.version}.`;
    const told: readonly (FactSource | null)[] = provenance.sources.length > 0 ? provenance.sources : [null];
    for (const source of told) {
      const identity = JSON.stringify([source?.source.slug, source?.locator, source?.note, entered]);
      const known = notes.get(identity) ?? { number: from + notes.size, body: <SourceLine source={source} />, fine: entered };
      notes.set(identity, known);
      const number = known.number;
      if (number !== null) numbers.set(key, [...new Set([...(numbers.get(key) ?? []), number])]);
    }
  }
  return { notes: [...notes.values()], numbersOf: (key) => numbers.get(key) ?? [] };
}

/** A source as the margin names it: its title (or `words` of your own), where in it, and a remark. */
export function SourceLine({ source, words }: { readonly source: FactSource | null; readonly words?: string }) {
  if (source === null) return <>No source on record.</>;
  return (
    <>
      <Link to={paths.source(source.source.slug)}>{words === undefined ? source.source.title : capital(words)}</Link>
      {words === undefined && source.locator !== null && `, ${source.locator}`}.{source.note !== null && ` ${source.note}`}
    </>
  );
}
