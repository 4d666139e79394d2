import { useId } from 'react';
import type { MarkPage } from '#contract/marks.ts';
import { MARK_KINDS } from '#domain/vocabulary.ts';
import type { MarkTechnique } from '#domain/vocabulary.ts';
import { SelectField } from '../../ui/select-field.tsx';
import { KIND_CHOICES } from './mark-words.ts';

type Nature = Pick<MarkPage, 'kind' | 'technique'>;

const TECHNIQUES: readonly { readonly value: MarkTechnique; readonly name: string; readonly means: string }[] = [
  { value: 'cast', name: 'Cast', means: 'Raised, or sunk, with the iron itself: made when it was poured.' },
  { value: 'stamped', name: 'Stamped', means: 'Struck or cut into it afterwards: made when it was machined or put together.' },
];

/** What kind of mark it is, and whether it was cast or stamped. */
export function MarkNature({ value, onChange }: { readonly value: Nature; readonly onChange: (nature: Nature) => void }) {
  const name = useId();
  return (
    <>
      <SelectField
        label="Kind of mark"
        value={value.kind}
        onChange={({ target }) => onChange({ ...value, kind: MARK_KINDS.find((kind) => kind === target.value) ?? value.kind })}
        className="max-w-80"
        hint="Only a date mark is dated"
      >
        {KIND_CHOICES.map(({ value: kind, text }) => (
          <option key={kind} value={kind}>
            {text}
          </option>
        ))}
      </SelectField>
      <fieldset className="mb-4">
        <legend className="mb-1 text-slag">How it was made</legend>
        {TECHNIQUES.map((technique) => (
          <div key={technique.value}>
            <label className="inline-flex min-h-11 cursor-pointer items-center gap-3 font-semibold">
              <input
                type="radio"
                name={name}
                value={technique.value}
                checked={value.technique === technique.value}
                onChange={() => onChange({ ...value, technique: technique.value })}
                aria-describedby={`${name}-${technique.value}`}
                className="size-5 shrink-0 accent-oxide"
              />
              {technique.name}
            </label>
            <p id={`${name}-${technique.value}`} className="pl-8 text-[15px] leading-snug text-slag">
              {technique.means}
            </p>
          </div>
        ))}
      </fieldset>
    </>
  );
}
