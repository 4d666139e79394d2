import type { CipherDefinition, SymbolSet } from '#domain/ciphers/definition.ts';
import { sayList } from '../../lib/say-number.ts';
import { Button } from '../../ui/button.tsx';
import { sayField } from '../ciphers/cipher-words.ts';
import { symbolsOfDigit } from './digit-symbols.ts';
import { DigitsEditor } from './digits-editor.tsx';
import { fieldsIn, withoutSet, withSet } from './edit-layout.ts';
import { FaultNote } from './fault-note.tsx';
import { KEY_ORDER } from './key-word.ts';
import type { Places } from './places.ts';
import { ValuesEditor } from './values-editor.tsx';

type Props = { readonly definition: CipherDefinition; readonly places: Places; readonly onChange: (next: CipherDefinition) => void };

/** Every symbol set as a compact table. */
export function SetsEditor({ definition, places, onChange }: Props) {
  const sets = Object.entries(definition.symbolSets);
  return (
    <section aria-labelledby={places.id('sets', 'heading')}>
      <h3 id={places.id('sets', 'heading')} className="mb-3 text-[19px] font-semibold">
        Symbols
      </h3>
      {sets.length === 0 && (
        <p className="max-w-measure text-slag">All in figures so far. Where a field is written in letters, choose a new key or new letters in it.</p>
      )}
      <div className="space-y-8">
        {sets.map(([name, set]) => (
          <SetEditor key={name} {...{ definition, places, onChange, name, set }} />
        ))}
      </div>
    </section>
  );
}

function SetEditor({ definition, places, onChange, name, set }: Props & { readonly name: string; readonly set: SymbolSet }) {
  const served = fieldsIn(definition, name);
  const [first] = served;
  const heading = served.length === 0 ? `“${name}”, in no field` : `“${name}”, for ${sayList(served.map(sayField), 'and')}`;
  const change = (next: SymbolSet) => onChange(withSet(definition, name, next));
  const isWanting = definition.fields.some((field, place) => field.field !== 'literal' && field.symbols === name && places.fault('fields', place, 'symbols') !== null);
  const missing = set.kind === 'digits' && isWanting ? KEY_ORDER.filter((digit) => symbolsOfDigit(set, digit) === '') : [];
  return (
    <section id={places.id('symbolSets', name)} tabIndex={-1} aria-label={heading} className="outline-none">
      <h4 className="mb-2 font-semibold">{heading}</h4>
      <FaultNote>{places.fault('symbolSets', name)}</FaultNote>
      <FaultNote>{missing.length === 0 ? null : `No symbol yet for ${sayList(missing, 'and')}`}</FaultNote>
      {set.kind === 'digits' ? (
        <DigitsEditor {...{ name, set, places }} onChange={change} />
      ) : (
        <ValuesEditor {...{ name, set, places, definition }} field={first?.field ?? 'other'} onChange={change} />
      )}
      {served.length === 0 && (
        <Button className="mt-3" onClick={() => onChange(withoutSet(definition, name))}>
          Take “{name}” away
        </Button>
      )}
    </section>
  );
}
