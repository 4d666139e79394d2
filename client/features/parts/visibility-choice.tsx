import { useId } from 'react';
import type { PartDraft } from './part-draft.ts';

const CHOICES: readonly { readonly value: PartDraft['visibility']; readonly name: string; readonly means: string }[] = [
  { value: 'private', name: 'Private', means: 'Only you see it. Nobody is asked to read its marks.' },
  {
    value: 'public',
    name: 'Public',
    means: 'Everybody sees what it is, its photos and its marks, and where it was found with the last digits of the serial masked. Other members are asked to read its marks. Your note stays yours.',
  },
];

type Props = { readonly id: string; readonly value: PartDraft['visibility']; readonly onChange: (visibility: PartDraft['visibility']) => void };

/** Who sees a part, each choice with what it means. */
export function VisibilityChoice({ id, value, onChange }: Props) {
  const name = useId();
  return (
    <fieldset id={id} className="mb-4">
      <legend className="mb-1 text-slag">Who sees it</legend>
      <div className="space-y-1">
        {CHOICES.map((choice) => (
          <div key={choice.value}>
            <label className="inline-flex min-h-11 cursor-pointer items-center gap-3 font-semibold">
              <input
                type="radio"
                name={name}
                value={choice.value}
                checked={value === choice.value}
                onChange={() => onChange(choice.value)}
                aria-describedby={`${name}-${choice.value}`}
                className="size-5 shrink-0 accent-oxide"
              />
              {choice.name}
            </label>
            <p id={`${name}-${choice.value}`} className="max-w-measure pl-8 text-[15px] leading-snug text-slag">
              {choice.means}
            </p>
          </div>
        ))}
      </div>
    </fieldset>
  );
}
