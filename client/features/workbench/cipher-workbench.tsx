import { useMemo } from 'react';
import type { FieldFault } from '#contract/problem.ts';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { PartingLine } from '../../ui/parting-line.tsx';
import { readDraft } from './draft-definition.ts';
import { DraftTrials } from './draft-trials.tsx';
import { ExceptionsEditor } from './exceptions-editor.tsx';
import { FaultList } from './fault-list.tsx';
import { checkDraft, mergedFaults } from './faults-of-draft.ts';
import { LayoutEditor } from './layout-editor.tsx';
import { placesOf } from './places.ts';
import { SetsEditor } from './sets-editor.tsx';
import { ShapeChoice } from './shape-choice.tsx';
import { YearsEditor } from './years-editor.tsx';

export type CipherWorkbenchProps = {
  /** The id of the whole; those of its controls begin with it. */
  readonly id: string;
  readonly label: string;
  /** A cipher definition, half or whole. */
  readonly value: unknown;
  readonly onChange: (next: CipherDefinition) => void;
  /** What the register says is wrong with it, each path beginning inside the definition. */
  readonly faults: readonly FieldFault[];
  readonly makerId: string | null;
  readonly foundryId: string | null;
  /** The cipher it would change; null for a new one. */
  readonly subjectId: string | null;
};

/**
 * Where a cipher is laid out and tried. The draft is whatever `onChange` was last told; it is never refused, its faults stand beside
 * their controls and together at the head.
 */
export function CipherWorkbench({ id, label, value, onChange, faults, makerId, foundryId, subjectId }: CipherWorkbenchProps) {
  const definition = useMemo(() => readDraft(value), [value]);
  const checked = useMemo(() => checkDraft(definition), [definition]);
  const isBlank = definition.fields.length === 0 && Object.keys(definition.symbolSets).length === 0;
  const { places, placed } = placesOf(id, definition, isBlank ? faults : mergedFaults(checked.faults, faults));
  const edit = { definition, places, onChange };
  return (
    <section id={id} tabIndex={-1} aria-label={label} className="space-y-8 outline-none">
      <div>
        <p className="mb-1 text-slag">{label}</p>
        <FaultList faults={placed} definition={definition} blank={isBlank} />
      </div>
      <ShapeChoice definition={definition} onChange={onChange} />
      <LayoutEditor {...edit} />
      <SetsEditor {...edit} />
      <YearsEditor {...edit} />
      <ExceptionsEditor {...edit} />
      <PartingLine />
      <DraftTrials {...{ definition, compiled: checked.compiled, makerId, foundryId, subjectId }} />
    </section>
  );
}
