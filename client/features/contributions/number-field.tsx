import { useState } from 'react';
import type { FieldProps } from '../../ui/field.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { textOf } from './draft-values.ts';
import type { Value } from './draft-values.ts';

/** A JSON number that is typed: what is no number yet is held as text, so that nothing typed is lost and the fault is told. */
export function NumberField({ value, onChange, ...field }: FieldProps & { readonly value: Value | undefined; readonly onChange: (value: Value) => void }) {
  const [typed, setTyped] = useState(textOf(value));
  // `1.` and `1.50` are on their way to a number and must not be rewritten while they are typed.
  const shown = numberIn(typed) === (value ?? null) ? typed : textOf(value);
  return (
    <TextField
      {...field}
      mono
      inputMode="decimal"
      autoComplete="off"
      value={shown}
      onChange={({ target }) => {
        setTyped(target.value);
        onChange(numberIn(target.value));
      }}
    />
  );
}

function numberIn(text: string): string | number | null {
  const plain = text.trim().replace(',', '.');
  if (plain === '') return null;
  return /^-?(?:\d+\.?\d*|\.\d+)$/.test(plain) ? Number(plain) : text;
}
