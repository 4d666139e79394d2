import { useId } from 'react';
import type { ComponentProps, ReactNode } from 'react';

type Props = Omit<ComponentProps<'input'>, 'type' | 'id' | 'className'> & { readonly label: ReactNode; readonly hint?: ReactNode };

/** A yes or no, its whole row a target. */
export function CheckField({ label, hint, ...input }: Props) {
  const id = useId();
  return (
    <div>
      <label htmlFor={id} className="inline-flex min-h-11 cursor-pointer items-center gap-3">
        <input
          {...input}
          id={id}
          type="checkbox"
          className="size-5 shrink-0 accent-oxide"
          {...(hint === undefined ? {} : { 'aria-describedby': `${id}-hint` })}
        />
        {label}
      </label>
      {hint !== undefined && (
        <p id={`${id}-hint`} className="pl-8 text-[15px] leading-snug text-slag">
          {hint}
        </p>
      )}
    </div>
  );
}
