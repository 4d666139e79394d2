import { useId } from 'react';
import type { ReactNode } from 'react';
import { MarginNotes } from './margin-notes.tsx';
import type { Note } from './margin-notes.tsx';

/** The blocks of a page, one under the other. */
export function PageGrid({ children }: { readonly children: ReactNode }) {
  return <div className="space-y-10">{children}</div>;
}

type BlockProps = {
  /** The block's heading; a block without one says nothing to a list of headings. */
  readonly heading?: string;
  readonly notes?: readonly Note[];
  /** Stands in the margin below the notes: links, a caution. */
  readonly margin?: ReactNode;
  readonly children: ReactNode;
};

/** Facts in the main column, who said so beside them; below 900 px the margin folds in under its block. */
export function Block({ heading, notes = [], margin, children }: BlockProps) {
  const id = useId();
  const hasMargin = notes.length > 0 || margin !== undefined;
  return (
    <section {...(heading === undefined ? {} : { 'aria-labelledby': id })} className="page-block">
      <div className="min-w-0">
        {heading !== undefined && (
          <h2 id={id} className="mb-3 text-[22px] leading-tight font-semibold">
            {heading}
          </h2>
        )}
        {children}
      </div>
      {hasMargin && (
        <div className="page-margin space-y-4">
          {notes.length > 0 && <MarginNotes notes={notes} />}
          {margin}
        </div>
      )}
    </section>
  );
}
