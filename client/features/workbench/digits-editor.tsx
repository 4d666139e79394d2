import { useState } from 'react';
import type { DigitsSet } from '#domain/ciphers/definition.ts';
import { foldCase } from '#domain/marks/glyphs.ts';
import { sayCount } from '../../lib/say-number.ts';
import { TextField } from '../../ui/text-field.tsx';
import { keyTyped, symbolsOfDigit, withDigitSymbols, withRepeater } from './digit-symbols.ts';
import { FaultNote } from './fault-note.tsx';
import { KEY_ORDER, spreadKey } from './key-word.ts';
import type { Places } from './places.ts';

type Props = { readonly name: string; readonly set: DigitsSet; readonly places: Places; readonly onChange: (next: DigitsSet) => void };

/** A symbol for each figure: typed at once as a key word, or figure by figure. */
export function DigitsEditor({ name, set, places, onChange }: Props) {
  const faults = KEY_ORDER.flatMap((digit) => places.fault('symbolSets', name, 'digit', digit) ?? []);
  return (
    <>
      <KeyWord {...{ name, set, onChange }} />
      <div role="group" aria-label={`Symbols of “${name}” by figure`} className="flex max-w-[600px] flex-wrap gap-2">
        {KEY_ORDER.map((digit) => (
          <DigitBox key={digit} {...{ name, set, places, digit, onChange }} />
        ))}
      </div>
      <div className="mt-1 min-h-6">
        {faults.map((fault) => (
          <FaultNote key={fault}>{fault}</FaultNote>
        ))}
      </div>
      <TextField
        id={places.id('symbolSets', name, 'repeater')}
        label="“The same again”"
        className="max-w-80"
        mono
        value={set.repeater ?? ''}
        maxLength={4}
        autoComplete="off"
        spellCheck={false}
        hint="The letter for a figure said twice; blank for none"
        error={places.fault('symbolSets', name, 'repeater')}
        onChange={({ target }) => onChange(withRepeater(set, target.value))}
      />
    </>
  );
}

/** The key word typed once. What can't be spread stays in the box with the reason, and the figures keep what they have. */
function KeyWord({ name, set, onChange }: Omit<Props, 'places'>) {
  const [refused, setRefused] = useState<{ readonly word: string; readonly reason: string; readonly beside: string } | null>(null);
  const beside = JSON.stringify(set.symbols);
  const standing = refused?.beside === beside ? refused : null;
  const word = standing?.word ?? keyTyped(set) ?? '';
  const type = (typed: string) => {
    const spread = spreadKey(typed);
    if (spread.ok) {
      setRefused(null);
      onChange({ ...set, symbols: spread.value });
    } else setRefused({ word: foldCase(typed), reason: spread.fault, beside });
  };
  return (
    <TextField
      label="Key word"
      className="max-w-80"
      mono
      value={word}
      aria-label={`Key word of “${name}”`}
      autoCapitalize="characters"
      autoComplete="off"
      spellCheck={false}
      hint={word.length === 0 || word.length === KEY_ORDER.length ? 'Ten letters, for 1 to 9 and 0' : `${sayCount(word.length)} of ten letters`}
      error={standing?.reason ?? null}
      onChange={({ target }) => type(target.value)}
    />
  );
}

function DigitBox({ name, set, places, digit, onChange }: Props & { readonly digit: string }) {
  const id = places.id('symbolSets', name, 'digit', digit);
  const fault = places.fault('symbolSets', name, 'digit', digit);
  const symbols = symbolsOfDigit(set, digit);
  return (
    <div className="w-12">
      <input
        id={id}
        aria-label={`Figure ${digit} in “${name}”`}
        aria-invalid={fault !== null}
        value={symbols}
        maxLength={6}
        autoCapitalize="characters"
        autoComplete="off"
        spellCheck={false}
        onChange={({ target }) => onChange(withDigitSymbols(set, digit, target.value))}
        className={`block h-12 w-full rounded border bg-paper px-1 text-center font-mono text-[19px] font-bold aria-invalid:border-2 aria-invalid:border-scale ${symbols === '' ? 'border-dashed border-edge' : 'border-edge'}`}
      />
      <span aria-hidden="true" className="block pt-1 text-center font-mono text-slag">
        {digit}
      </span>
    </div>
  );
}
