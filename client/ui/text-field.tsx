import type { ComponentProps } from 'react';
import { CONTROL, Field } from './field.tsx';
import type { FieldProps } from './field.tsx';

type Props = FieldProps & Omit<ComponentProps<'input'>, 'id' | 'className'> & { readonly mono?: boolean };

/** One line of text. `mono` for marks, numbers and serials. */
export function TextField({ label, hint, error, id, className, mono = false, ...input }: Props) {
  return (
    <Field {...{ label, hint, error }} {...(id === undefined ? {} : { id })} {...(className === undefined ? {} : { className })}>
      {(control) => <input {...input} {...control} className={`${CONTROL} ${mono ? 'font-mono' : ''}`} />}
    </Field>
  );
}
