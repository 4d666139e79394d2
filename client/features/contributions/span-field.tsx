import type { FactField } from '#contract/kinds/kind.ts';
import { TextField } from '../../ui/text-field.tsx';
import { useFaultAt } from './draft-context.ts';
import { controlId } from './draft-faults.ts';
import { labelOf } from './draft-field-props.ts';
import type { DraftFieldProps } from './draft-field-props.ts';
import { endsOf, textOf } from './draft-values.ts';
import type { Value } from './draft-values.ts';
import { NumberField } from './number-field.tsx';

type SpanControl = 'days' | 'numbers' | 'counts';
type End = 'from' | 'to';

/** First and last, side by side: days, numbers of a series, or counts. */
export function SpanField({ field, path, value, onChange }: DraftFieldProps<SpanControl>) {
  const ends = endsOf(value);
  const fault = useFaultAt(path);
  const change = (end: End, typed: Value): void => {
    const next = { ...ends, [end]: typed };
    const blank = mayBeLeftOut(field) && next.from === null && next.to === null;
    onChange(blank ? null : { from: next.from, to: next.to });
  };
  const hintId = `${controlId(path)}-hint`;
  return (
    <fieldset className="mb-1 min-w-0" {...(field.hint === undefined ? {} : { 'aria-describedby': hintId })}>
      <legend className="text-slag">{labelOf(field)}</legend>
      {(field.hint !== undefined || fault !== null) && (
        <p id={hintId} className={`text-[15px] leading-6 ${fault === null ? 'text-slag' : 'font-semibold text-scale'}`}>
          {fault ?? field.hint}
        </p>
      )}
      <div className="grid max-w-[440px] grid-cols-2 gap-x-4">
        {(['from', 'to'] as const).map((end) => (
          <SpanEnd key={end} field={field} path={[...path, end]} end={end} value={ends[end]} onChange={(typed) => change(end, typed)} />
        ))}
      </div>
    </fieldset>
  );
}

function mayBeLeftOut(field: Extract<FactField, { readonly control: SpanControl }>): boolean {
  return field.optional === true && field.control !== 'numbers';
}

function SpanEnd({ field, path, end, value, onChange }: DraftFieldProps<SpanControl> & { readonly end: End }) {
  const shared = { id: controlId(path), error: useFaultAt(path) };
  const [least, most] = field.control === 'counts' ? ['Least', 'Most'] : ['First', 'Last'];
  const label = end === 'from' ? least : most;
  if (field.control === 'counts') {
    return <NumberField {...shared} label={field.unit === '' ? label : `${label}, ${field.unit}`} value={value} onChange={onChange} />;
  }
  const isDay = field.control === 'days';
  // What must be given is blank text, so that its own words ask for it; what may stay open is nothing.
  const mayBeOpen = isDay ? field.open === true : field.open === 'both' || end === 'to';
  return (
    <TextField
      {...shared}
      label={label}
      {...(isDay ? { type: 'date', min: '1500-01-01', max: '2199-12-31' } : { mono: true, inputMode: 'numeric' as const, autoComplete: 'off' })}
      value={textOf(value)}
      onChange={({ target }) => onChange(target.value === '' ? (mayBeOpen ? null : '') : target.value)}
    />
  );
}
