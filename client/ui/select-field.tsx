import type { ComponentProps } from 'react';
import { CONTROL, Field } from './field.tsx';
import type { FieldProps } from './field.tsx';

/** One of a list, with the device's own picker. Options are its children. */
export function SelectField({ label, hint, error, id, className, ...select }: FieldProps & Omit<ComponentProps<'select'>, 'id' | 'className'>) {
  return (
    <Field {...{ label, hint, error }} {...(id === undefined ? {} : { id })} {...(className === undefined ? {} : { className })}>
      {(control) => <select {...select} {...control} className={`${CONTROL} select-arrow pr-10`} />}
    </Field>
  );
}
