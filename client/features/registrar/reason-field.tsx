import { PEOPLE_LIMITS } from '#contract/people.ts';
import type { FormField } from '../../lib/use-contract-form.ts';
import { CONTROL, Field } from '../../ui/field.tsx';

/** Why somebody is suspended, or no longer. */
export function ReasonField({ id, name, error, hint }: FormField & { readonly hint: string }) {
  return (
    <Field id={id} label="Reason" hint={hint} error={error}>
      {(control) => <textarea {...control} name={name} rows={3} maxLength={PEOPLE_LIMITS.suspensionReason} className={CONTROL} />}
    </Field>
  );
}
