import type { ReactNode } from 'react';
import { useDraft } from '../../lib/use-draft.ts';
import { SelectField } from '../../ui/select-field.tsx';
import { TextField } from '../../ui/text-field.tsx';

type TextFilterProps = {
  readonly label: string;
  readonly value: string;
  readonly onChange: (value: string) => void;
  readonly hint?: ReactNode;
  readonly error?: string | undefined;
  readonly mono?: boolean;
  readonly className?: string;
};

/** A text that narrows the list while it is typed, after a pause. */
export function TextFilter({
  label,
  value,
  onChange,
  hint,
  error,
  mono = false,
  className = 'col-span-2 wide:col-span-1',
}: TextFilterProps) {
  const [draft, setDraft] = useDraft(value, onChange);
  return (
    <TextField
      type="search"
      label={label}
      value={draft}
      onChange={(event) => setDraft(event.target.value)}
      autoComplete="off"
      autoCapitalize={mono ? 'characters' : 'off'}
      spellCheck={false}
      mono={mono}
      error={error}
      className={className}
      {...(hint === undefined ? {} : { hint })}
    />
  );
}

export type Choice = { readonly value: string; readonly text: string };

type ChoiceFilterProps = {
  readonly label: string;
  readonly value: string | undefined;
  /** Undefined while they are on their way. */
  readonly choices: readonly Choice[] | undefined;
  /** What no choice is called. */
  readonly all: string;
  readonly onChange: (value: string | null) => void;
};

/** One of a list, or all. A choice the address names and the list lacks is still shown, so that it can be taken away. */
export function ChoiceFilter({ label, value = '', choices = [], all, onChange }: ChoiceFilterProps) {
  const known = value === '' || choices.some((choice) => choice.value === value);
  return (
    <SelectField
      label={label}
      value={value}
      onChange={(event) => onChange(event.target.value === '' ? null : event.target.value)}
    >
      <option value="">{all}</option>
      {!known && <option value={value}>{value}</option>}
      {choices.map((choice) => (
        <option key={choice.value} value={choice.value}>
          {choice.text}
        </option>
      ))}
    </SelectField>
  );
}

/** The order of the list; its own order is not written in the address. */
export function OrderFilter({
  value,
  orders,
  onChange,
}: {
  readonly value: string;
  readonly orders: readonly Choice[];
  readonly onChange: (value: string | null) => void;
}) {
  const [own] = orders;
  return (
    <SelectField
      label="In order of"
      value={value}
      onChange={(event) => onChange(event.target.value === own?.value ? null : event.target.value)}
    >
      {orders.map((order) => (
        <option key={order.value} value={order.value}>
          {order.text}
        </option>
      ))}
    </SelectField>
  );
}
