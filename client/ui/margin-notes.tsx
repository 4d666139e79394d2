import type { ReactNode } from 'react';

/** One note in the margin. */
export type Note = {
  /** Its number on the page; null for a note that nothing in the text points to. */
  readonly number: number | null;
  readonly heading?: string;
  readonly body: ReactNode;
  /** Who entered it and when, or any remark on the note itself; set in italics. */
  readonly fine?: ReactNode;
};

/** Beside the block on a wide screen, below it on a narrow one. Numbers match the `NoteRef`s in the block. */
export function MarginNotes({ notes }: { readonly notes: readonly Note[] }) {
  return (
    <ul className="space-y-3 text-[14px] leading-[1.45] text-slag">
      {notes.map(({ number, heading, body, fine }, place) => (
        <li key={number ?? `at ${place}`} {...(number === null ? {} : { id: noteId(number) })} className="scroll-mt-4 target:bg-bed">
          {number !== null && (
            <span className="mr-1 font-semibold text-graphite">
              <span className="sr-only">Note </span>
              {number}
            </span>
          )}
          {heading !== undefined && <span className="font-semibold text-graphite">{heading} </span>}
          <span>{body}</span>
          {fine !== undefined && <span className="block italic">{fine}</span>}
        </li>
      ))}
    </ul>
  );
}

/** Points from a fact to its notes: small raised numbers. */
export function NoteRef({ numbers }: { readonly numbers: readonly number[] }) {
  return (
    <sup className="ml-0.5 text-[0.72em] leading-none whitespace-nowrap">
      {numbers.map((number, place) => (
        <a key={number} href={`#${noteId(number)}`} aria-label={`Note ${number}`} className="px-0.5 no-underline hover:underline">
          {place > 0 ? ' ' : ''}
          {number}
        </a>
      ))}
    </sup>
  );
}

function noteId(number: number): string {
  return `note-${number}`;
}
