import type { FactField } from '#contract/kinds/kind.ts';
import type { Path, Value } from './draft-values.ts';

/** What every control of a draft is given. */
export type DraftFieldProps<Control extends FactField['control'] = FactField['control']> = {
  readonly field: Extract<FactField, { readonly control: Control }>;
  /** Where the value stands in the draft. */
  readonly path: Path;
  readonly value: Value | undefined;
  readonly onChange: (value: Value) => void;
};

export function labelOf({ label, optional }: FactField): string {
  return optional ? `${label} (optional)` : label;
}
