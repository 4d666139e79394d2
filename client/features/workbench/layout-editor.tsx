import { useEffect, useRef, useState } from 'react';
import { CIPHER_LIMITS, FIELD_KINDS } from '#domain/ciphers/definition.ts';
import type { CipherDefinition, FieldKind } from '#domain/ciphers/definition.ts';
import { capital, sayPlace } from '../../lib/say-number.ts';
import { Live } from '../../ui/live.tsx';
import { FIELD_NAMES, sayField } from '../ciphers/cipher-words.ts';
import { withFieldAdded, withFieldMoved, withoutField } from './edit-layout.ts';
import { FaultNote } from './fault-note.tsx';
import { FieldCard } from './field-card.tsx';
import type { Places } from './places.ts';

type Props = { readonly definition: CipherDefinition; readonly places: Places; readonly onChange: (next: CipherDefinition) => void };

/** The fields in the order they stand on the iron. Focus goes along with a field that is moved. */
export function LayoutEditor({ definition, places, onChange }: Props) {
  const [said, setSaid] = useState('');
  const toFocus = useRef<string | null>(null);
  useEffect(() => {
    if (toFocus.current !== null) document.getElementById(toFocus.current)?.focus();
    toFocus.current = null;
  }, [definition.fields]);

  const act = (next: CipherDefinition, focus: string, words: string) => {
    toFocus.current = focus;
    setSaid(words);
    onChange(next);
  };
  const move = (place: number, by: -1 | 1) => {
    const field = definition.fields[place];
    if (field === undefined) return;
    const words = `${capital(sayField(field))} is now the ${sayPlace(place + by)} field`;
    act(withFieldMoved(definition, place, by), places.id('fields', place + by, by < 0 ? 'earlier' : 'later'), words);
  };
  const takeOut = (place: number) => {
    const field = definition.fields[place];
    if (field !== undefined) act(withoutField(definition, place), places.id('fields'), `${capital(sayField(field))} is taken out`);
  };
  const add = (kind: FieldKind) => {
    const place = definition.fields.length;
    act(withFieldAdded(definition, kind), places.id('fields', place, 'kind'), `${capital(FIELD_NAMES[kind])} is now the ${sayPlace(place)} field`);
  };
  return (
    <section id={places.id('fields')} tabIndex={-1} aria-labelledby={places.id('fields', 'heading')} className="outline-none">
      <h3 id={places.id('fields', 'heading')} className="mb-3 text-[19px] font-semibold">
        Fields, in the order they stand on the iron
      </h3>
      <FaultNote>{places.fault('fields')}</FaultNote>
      <Live>{said}</Live>
      {definition.fields.length > 0 && (
        <ol className="mb-6 grid gap-x-6 gap-y-8 roomy:grid-cols-2 min-[1100px]:grid-cols-3">
          {definition.fields.map((field, place) => (
            <FieldCard
              key={place}
              {...{ definition, place, field, places, onChange }}
              onMove={(by) => move(place, by)}
              onTakeOut={() => takeOut(place)}
            />
          ))}
        </ol>
      )}
      {definition.fields.length < CIPHER_LIMITS.fields && (
        <div role="group" aria-label="Put in a field" className="flex flex-wrap items-center gap-2">
          <span className="mr-1 text-slag">Put in:</span>
          {FIELD_KINDS.map((kind) => (
            <button
              key={kind}
              type="button"
              onClick={() => add(kind)}
              className="min-h-11 cursor-pointer rounded border border-edge bg-paper px-3 text-[15px] hover:border-graphite"
            >
              {FIELD_NAMES[kind]}
            </button>
          ))}
        </div>
      )}
    </section>
  );
}
