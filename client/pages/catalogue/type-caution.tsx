import { Caution } from '../../ui/caution.tsx';
import { NoteRef } from '../../ui/margin-notes.tsx';

/** What a part type warns of; the register tells, and leaves the judging to those who may. */
export function TypeCaution({ caution, notes = [] }: { readonly caution: string; readonly notes?: readonly number[] }) {
  return (
    <Caution title="Before you work on it">
      <p>
        {caution}
        {notes.length > 0 && <NoteRef numbers={notes} />}
      </p>
      <p className="mt-1 text-slag">Local codes and competent persons decide, not this page.</p>
    </Caution>
  );
}
