import { z } from 'zod';
import type { FactField } from '#contract/kinds/kind.ts';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { CheckField } from '../../ui/check-field.tsx';
import { CONTROL, Field } from '../../ui/field.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { CipherWorkbench } from '../workbench/cipher-workbench.tsx';
import { useFaultAt, useSurroundings } from './draft-context.ts';
import { controlId } from './draft-faults.ts';
import { labelOf } from './draft-field-props.ts';
import type { DraftFieldProps } from './draft-field-props.ts';
import { blankOf, textOf } from './draft-values.ts';
import type { Path, Value } from './draft-values.ts';
import { AccountChooser, FactChooser } from './fact-chooser.tsx';
import { NumberField } from './number-field.tsx';
import { RowsField } from './rows-field.tsx';
import { SpanField } from './span-field.tsx';

/** The control of one field, as the field's own description asks for it. */
export function DraftField({ field, ...rest }: DraftFieldProps) {
  switch (field.control) {
    case 'line':
    case 'whole':
      return <Line field={field} {...rest} />;
    case 'prose':
      return <ProseBox field={field} {...rest} />;
    case 'number':
      return <NumberLine field={field} {...rest} />;
    case 'yes-no':
      return <YesNo field={field} {...rest} />;
    case 'choice':
      return <Choices field={field} {...rest} />;
    case 'days':
    case 'numbers':
    case 'counts':
      return <SpanField field={field} {...rest} />;
    case 'fact':
    case 'account':
      return <Reference field={field} {...rest} />;
    case 'rows':
      return <RowsField field={field} {...rest} cell={(props) => <DraftField key={props.field.key} {...props} />} />;
    case 'cipher':
      return <Layout field={field} {...rest} />;
  }
}

/** What every control says of itself. */
function useControl(field: FactField, path: Path) {
  const error = useFaultAt(path);
  const hint = field.hint;
  return { id: controlId(path), label: labelOf(field), error, ...(hint === undefined ? {} : { hint }) };
}

function Line({ field, path, value, onChange }: DraftFieldProps<'line' | 'whole'>) {
  const isNumber = field.control === 'whole';
  return (
    <TextField
      {...useControl(field, path)}
      mono={isNumber || field.mono === true}
      {...(isNumber ? { inputMode: 'numeric' } : {})}
      autoComplete="off"
      value={textOf(value)}
      onChange={({ target }) => onChange(target.value === '' ? blankOf(field) : target.value)}
    />
  );
}

function ProseBox({ field, path, value, onChange }: DraftFieldProps<'prose'>) {
  return (
    <Field {...useControl(field, path)}>
      {(control) => (
        <textarea {...control} rows={3} className={CONTROL} value={textOf(value)} onChange={({ target }) => onChange(target.value === '' ? blankOf(field) : target.value)} />
      )}
    </Field>
  );
}

function NumberLine({ field, path, value, onChange }: DraftFieldProps<'number'>) {
  const { label, ...control } = useControl(field, path);
  return <NumberField {...control} label={field.unit === undefined ? label : `${label}, ${field.unit}`} value={value} onChange={onChange} className="max-w-[220px]" />;
}

function YesNo({ field, path, value, onChange }: DraftFieldProps<'yes-no'>) {
  const { id, error, hint } = useControl(field, path);
  return (
    <div id={id} tabIndex={-1} className="mb-4 outline-none">
      <CheckField
        label={field.label}
        checked={value === true}
        onChange={({ target }) => onChange(target.checked)}
        {...(error === null ? (hint === undefined ? {} : { hint }) : { hint: <span className="font-semibold text-scale">{error}</span>, 'aria-invalid': true })}
      />
    </div>
  );
}

function Choices({ field, path, value, onChange }: DraftFieldProps<'choice'>) {
  return (
    <SelectField {...useControl(field, path)} value={textOf(value)} onChange={({ target }) => onChange(target.value === '' ? null : target.value)} className="max-w-[440px]">
      <option value="">{field.optional ? 'All' : 'Choose'}</option>
      {field.choices.map((choice) => (
        <option key={choice.value} value={choice.value}>
          {choice.label}
        </option>
      ))}
    </SelectField>
  );
}

function Reference({ field, path, value, onChange }: DraftFieldProps<'fact' | 'account'>) {
  const control = { ...useControl(field, path), value: typeof value === 'string' && value !== '' ? value : null, onChange };
  return field.control === 'fact' ? <FactChooser {...control} field={field} /> : <AccountChooser {...control} />;
}

function Layout({ field, path, value, onChange }: DraftFieldProps<'cipher'>) {
  const { payload, subjectId, faults } = useSurroundings();
  const inside = faults.filter((fault) => path.every((step, place) => fault.path[place] === step));
  return (
    <CipherWorkbench
      id={controlId(path)}
      label={field.label}
      value={value}
      onChange={(definition) => onChange(asValue(definition))}
      faults={inside.map((fault) => ({ ...fault, path: fault.path.slice(path.length) }))}
      makerId={idIn(payload['makerId'])}
      foundryId={idIn(payload['foundryId'])}
      subjectId={subjectId}
    />
  );
}

/** As it goes over the line: without what is undefined. */
function asValue(definition: CipherDefinition): Value {
  const sent: unknown = JSON.parse(JSON.stringify(definition));
  return z.json().parse(sent);
}

function idIn(value: Value | undefined): string | null {
  return typeof value === 'string' && value !== '' ? value : null;
}
