import { useState } from 'react';
import type { ComponentProps } from 'react';
import { CONTROL, Field } from '../../ui/field.tsx';
import type { FieldProps } from '../../ui/field.tsx';

type Props = FieldProps &
  Omit<ComponentProps<'input'>, 'id' | 'className' | 'type' | 'autoComplete'> & { readonly autoComplete: 'current-password' | 'new-password' };

/** A password, which may be shown while it is typed, and pasted. */
export function PasswordField({ label, hint, error, id, className, ...input }: Props) {
  const [shown, setShown] = useState(false);
  return (
    <Field {...{ label, hint, error }} {...(id === undefined ? {} : { id })} {...(className === undefined ? {} : { className })}>
      {(control) => (
        <span className="flex">
          <input
            {...input}
            {...control}
            type={shown ? 'text' : 'password'}
            autoCapitalize="off"
            autoCorrect="off"
            spellCheck={false}
            className={`${CONTROL} min-w-0 rounded-r-none`}
          />
          <button
            type="button"
            aria-pressed={shown}
            aria-controls={control.id}
            onClick={() => setShown(!shown)}
            className="min-h-11 min-w-16 shrink-0 cursor-pointer rounded-r border border-l-0 border-edge bg-bed px-3 text-graphite hover:border-graphite"
          >
            {shown ? 'Hide' : 'Show'}
            <span className="sr-only"> password</span>
          </button>
        </span>
      )}
    </Field>
  );
}
