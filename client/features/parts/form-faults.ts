import type { FieldFault } from '#contract/problem.ts';
import type { SummaryFault } from '../../ui/error-summary.tsx';
import { FIELD_LABELS } from './part-draft.ts';
import { partControlId } from './part-fields.tsx';

function isField(name: unknown): name is keyof typeof FIELD_LABELS {
  return typeof name === 'string' && name in FIELD_LABELS;
}

/** Faults of a part's form for the summary: each with its box's name and the way to it. */
export function summaryOf(faults: readonly FieldFault[]): readonly SummaryFault[] {
  return faults.map(({ path: [field], message }) =>
    isField(field) ? { message: `${FIELD_LABELS[field]}: ${message}`, controlId: partControlId(field) } : { message, controlId: null },
  );
}
