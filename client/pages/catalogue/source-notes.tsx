import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { paths } from '../../lib/paths.ts';
import { sayMoment } from '../../lib/say-date.ts';
import { MarginNotes } from '../../ui/margin-notes.tsx';
import { SourceLine } from '../../ui/source-line.tsx';
import { bySource } from './page-notes.ts';
import type { SourceNote } from './page-notes.ts';

/**
 * The sources beside a block, each with who entered the fact and when. A source that many facts rest on is named once, with a line
 * for each place in it.
 */
export function SourceNotes({ notes }: { readonly notes: readonly SourceNote[] }) {
  return bySource(notes).map((group) => {
    const [first] = group;
    if (first === undefined) return null;
    const { number, source } = first;
    return group.length === 1 ? (
      <MarginNotes key={number} notes={[{ number, body: <SourceLine source={source} />, fine: sayEntered(first) }]} />
    ) : (
      <section key={number} className="text-[14px] leading-[1.45] text-slag">
        <p className="font-semibold">
          {source === null ? 'No source on record' : <Link to={paths.source(source.source.slug)}>{source.source.title}</Link>}
        </p>
        <MarginNotes notes={group.map((note) => ({ number: note.number, body: <PlaceLine note={note} /> }))} />
      </section>
    );
  });
}

/** A block's margin with its sources; undefined where it has none of its own, so that no empty margin is ruled. */
export function sourceMargin(notes: readonly SourceNote[]): ReactNode {
  return notes.length === 0 ? undefined : <SourceNotes notes={notes} />;
}

function PlaceLine({ note }: { readonly note: SourceNote }) {
  const { source } = note;
  return (
    <>
      {source?.locator !== null && source?.locator !== undefined && `${source.locator}. `}
      {source?.note !== null && source?.note !== undefined && `${source.note} `}
      <span className="italic">{sayEntered(note)}</span>
    </>
  );
}

/** `Harrow Lane, 4 Mar 2026`; a version only where there has been more than one. */
function sayEntered({ enteredBy, enteredAt, version }: SourceNote): string {
  return `Entered by ${enteredBy}, ${sayMoment(enteredAt)}${version === 1 ? '' : `, version ${version}`}.`;
}
