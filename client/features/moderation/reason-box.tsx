import { FACT_LIMITS } from '#contract/kinds/kind.ts';
import type { FormField } from '../../lib/use-contract-form.ts';
import { CONTROL, Field } from '../../ui/field.tsx';

/** Why something was done to the catalogue; it stands in the history for good. */
export function ReasonBox({ id, name, error, hint = 'It stands in the history, with your name.' }: FormField & { readonly hint?: string }) {
  return (
    <Field id={id} label="Reason" hint={hint} error={error}>
      {(control) => <textarea {...control} name={name} rows={3} maxLength={FACT_LIMITS.prose} className={CONTROL} />}
    </Field>
  );
}
