import { useState } from 'react';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { Button } from '../../ui/button.tsx';
import { sayField } from '../ciphers/cipher-words.ts';
import { beginFrom, SHAPES } from './shapes.ts';
import type { Shape } from './shapes.ts';

type Props = { readonly definition: CipherDefinition; readonly onChange: (next: CipherDefinition) => void };

/** Common shapes to begin from. What stood there before can be had back. */
export function ShapeChoice({ definition, onChange }: Props) {
  const [before, setBefore] = useState<{ readonly name: string; readonly definition: CipherDefinition } | null>(null);
  const isBare = definition.fields.length === 0;
  const begin = (shape: Shape) => {
    setBefore(isBare ? null : { name: shape.name, definition });
    onChange(beginFrom(shape, definition));
  };
  return (
    <details {...(isBare ? { open: true } : {})}>
      <summary className="inline-flex min-h-11 cursor-pointer items-center underline underline-offset-4">Begin from a common shape</summary>
      <ul className="grid gap-3 pt-1 roomy:grid-cols-2">
        {SHAPES.map((shape) => (
          <li key={shape.code}>
            <button
              type="button"
              onClick={() => begin(shape)}
              className="block size-full min-h-11 cursor-pointer rounded border border-edge bg-paper px-4 py-3 text-left hover:border-graphite"
            >
              <span className="block font-semibold">{shape.name}</span>
              <span className="block text-slag italic">{shape.fields.filter(({ field }) => field !== 'literal').map(sayField).join(' · ')}</span>
              <span className="mt-1 block text-[15px] leading-snug">{shape.about}</span>
            </button>
          </li>
        ))}
      </ul>
      <div role="status" className="mt-3">
        {before !== null && (
          <p className="flex flex-wrap items-center gap-3">
            “{before.name}” took the place of what was laid out.
            <Button
              onClick={() => {
                onChange(before.definition);
                setBefore(null);
              }}
            >
              Put it back
            </Button>
          </p>
        )}
      </div>
    </details>
  );
}
