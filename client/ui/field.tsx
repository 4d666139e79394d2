import { useId } from 'react';
import type { ReactNode } from 'react';

/** What the control of a field must carry. */
export type ControlProps = { readonly id: string; readonly 'aria-invalid'?: true; readonly 'aria-describedby'?: string };

export type FieldProps = {
  readonly label: ReactNode;
  /** Said below the control when there is no error. */
  readonly hint?: ReactNode;
  /** What is wrong with it; takes the hint's place. */
  readonly error?: string | null | undefined;
  /** An id of your own, so that an error summary can point here. */
  readonly id?: string;
  readonly className?: string;
};

/** Owns id, label and message of one control, and keeps room for the message so that nothing jumps when it comes. */
export function Field({ label, hint, error, id, className = '', children }: FieldProps & { readonly children: (control: ControlProps) => ReactNode }) {
  const made = useId();
  const controlId = id ?? made;
  const messageId = `${controlId}-message`;
  const faulty = error !== undefined && error !== null;
  const described = faulty || hint !== undefined;
  return (
    <div className={`mb-1 ${className}`}>
      <label htmlFor={controlId} className="mb-1 block text-slag">
        {label}
      </label>
      {children({ id: controlId, ...(faulty ? { 'aria-invalid': true } : {}), ...(described ? { 'aria-describedby': messageId } : {}) })}
      <p id={messageId} className={`mt-1 min-h-6 text-[15px] leading-6 ${faulty ? 'font-semibold text-scale' : 'text-slag'}`}>
        {faulty ? error : hint}
      </p>
    </div>
  );
}

/** The look of every text control; `aria-invalid` gives it the error's edge. */
export const CONTROL =
  'block min-h-11 w-full rounded border border-edge bg-paper px-3 py-2 text-graphite aria-invalid:border-2 aria-invalid:border-scale disabled:bg-bed disabled:text-slag';
