import type { ReactNode } from 'react';
import { NoteRef } from '../../ui/margin-notes.tsx';

export type Fact = {
  readonly name: string;
  readonly value: ReactNode;
  /** Numbers of the notes behind it. */
  readonly notes?: readonly number[];
  /** What can be done about it, below. */
  readonly deeds?: ReactNode;
};

/** Facts of one thing as ruled lines. `names`: `said` for the register's own headings, `cast` for places on the iron. */
export function FactList({ facts, names = 'said' }: { readonly facts: readonly Fact[]; readonly names?: 'said' | 'cast' }) {
  return (
    <dl>
      {facts.map(({ name, value, notes = [], deeds }, place) => (
        <div
          key={`${name} ${place}`}
          className="grid break-inside-avoid grid-cols-[104px_minmax(0,1fr)] gap-x-4 border-b border-rule py-3 roomy:grid-cols-[152px_minmax(0,1fr)]"
        >
          <dt className={names === 'said' ? 'text-slag italic' : 'font-semibold'}>{name}</dt>
          <dd>
            {value}
            {notes.length > 0 && <NoteRef numbers={notes} />}
            {deeds}
          </dd>
        </div>
      ))}
    </dl>
  );
}
