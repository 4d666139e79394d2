import { useState } from 'react';
import type { CipherDefinition, DateField, ValuesSet } from '#domain/ciphers/definition.ts';
import { parseDay } from '#domain/dates/day.ts';
import { foldCase } from '#domain/marks/glyphs.ts';
import { fail } from '#domain/result.ts';
import { sayPlace } from '../../lib/say-number.ts';
import { today } from '../../lib/today.ts';
import { Button } from '../../ui/button.tsx';
import { CheckField } from '../../ui/check-field.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { symbolLines } from '../ciphers/cipher-words.ts';
import { FaultNote } from './fault-note.tsx';
import { spreadRun } from './key-word.ts';
import type { Places } from './places.ts';
import { isNumbers, nextNumber, runOf, symbolsOfRows, valueRowsOf } from './value-rows.ts';
import type { ValueRow } from './value-rows.ts';

type Props = {
  readonly name: string;
  readonly set: ValuesSet;
  /** What the set is for: says what its numbers mean. */
  readonly field: DateField | 'other';
  readonly definition: CipherDefinition;
  readonly places: Places;
  readonly onChange: (next: ValuesSet) => void;
};

/** A symbol for each number: typed at once as a run of letters, or row by row. */
export function ValuesEditor({ name, set, field, definition, places, onChange }: Props) {
  return (
    <>
      <Run {...{ name, set, field, definition, onChange }} />
      <Rows {...{ name, set, field, definition, places, onChange }} />
      {field === 'year' && <Cycle {...{ name, set, places, onChange }} />}
    </>
  );
}

/** Letters in order, typed once. What can't be spread stays in the box with the reason, and the rows keep what they have. */
function Run({ name, set, field, definition, onChange }: Omit<Props, 'places'>) {
  const run = runOf(set);
  const [refused, setRefused] = useState<{ readonly letters: string; readonly reason: string; readonly beside: string } | null>(null);
  const [typedFirst, setTypedFirst] = useState<string | null>(null);
  const beside = JSON.stringify(set.symbols);
  const standing = refused?.beside === beside ? refused : null;
  const first = typedFirst ?? String(run?.first ?? (field === 'year' ? definition.usedFrom.slice(0, 4) : 1));
  const letters = standing?.letters ?? run?.letters ?? '';
  const isFirst = /^\d{1,4}$/.test(first);
  const spread = (typed: string, from: string) => {
    const made = /^\d{1,4}$/.test(from) ? spreadRun(typed, Number(from)) : fail('Say what the first of them stands for');
    if (made.ok) {
      setRefused(null);
      onChange({ ...set, symbols: made.value });
    } else setRefused({ letters: foldCase(typed), reason: made.fault, beside });
  };
  return (
    <div className="grid gap-x-4 roomy:grid-cols-[minmax(0,1fr)_176px]">
      <TextField
        label="Letters in order"
        aria-label={`Letters of “${name}” in order`}
        mono
        value={letters}
        autoCapitalize="characters"
        autoComplete="off"
        spellCheck={false}
        hint="One for each number, without those left out"
        error={standing?.reason ?? null}
        onChange={({ target }) => spread(target.value, first)}
      />
      <TextField
        label="The first stands for"
        aria-label={`The first letter of “${name}” stands for`}
        inputMode="numeric"
        autoComplete="off"
        maxLength={4}
        value={first}
        error={isFirst ? null : field === 'year' ? 'A year, as 1911' : 'A whole number'}
        onChange={({ target }) => {
          setTypedFirst(target.value);
          if (letters !== '') spread(letters, target.value);
        }}
      />
    </div>
  );
}

type HeldRow = ValueRow & { readonly id: number };
/** Rows as they are typed, and the symbols last handed on or seen from outside. */
type Held = { readonly rows: readonly HeldRow[]; readonly seen: string; readonly nextId: number };

function hold(set: ValuesSet): Held {
  const rows = valueRowsOf(set).map((row, id) => ({ ...row, id }));
  return { rows, seen: JSON.stringify(set.symbols), nextId: rows.length };
}

/** Rows keep their places while they are typed in; a change from elsewhere lays them out anew. */
function Rows({ name, set, field, definition, places, onChange }: Props) {
  const [held, setHeld] = useState(() => hold(set));
  const now = JSON.stringify(set.symbols);
  if (held.seen !== now) setHeld(hold(set));
  const { rows } = held;
  const { keys } = symbolsOfRows(rows);
  const meanings = meaningsOf(set, field, definition);

  const change = (next: readonly HeldRow[], nextId = held.nextId) => {
    const { symbols } = symbolsOfRows(next);
    setHeld({ rows: next, seen: JSON.stringify(symbols), nextId });
    onChange({ ...set, symbols });
  };
  const put = (id: number, part: Partial<ValueRow>) => change(rows.map((row) => (row.id === id ? { ...row, ...part } : row)));
  return (
    <>
      {rows.length > 0 && (
        <ul aria-label={`Symbols of “${name}”`} className="grid gap-x-8 roomy:grid-cols-2">
          {rows.map((row, place) => {
            const key = keys[place] ?? '';
            return (
              <Row
                key={row.id}
                id={places.id('symbolSets', name, 'symbols', key)}
                row={row}
                said={`${sayPlace(place)} row of “${name}”`}
                meaning={meanings.get(key) ?? ''}
                fault={row.means === '' || isNumbers(row.means) ? places.fault('symbolSets', name, 'symbols', key) : 'Whole numbers, with commas between'}
                onChange={(part) => put(row.id, part)}
                onTakeOut={() => change(rows.filter(({ id }) => id !== row.id))}
              />
            );
          })}
        </ul>
      )}
      <Button
        className="mt-3"
        onClick={() => change([...rows, { id: held.nextId, symbol: '', means: nextNumber(rows) }], held.nextId + 1)}
      >
        Put in a symbol<span className="sr-only"> of “{name}”</span>
      </Button>
    </>
  );
}

type RowProps = {
  readonly id: string;
  readonly row: HeldRow;
  readonly said: string;
  readonly meaning: string;
  readonly fault: string | null;
  readonly onChange: (part: Partial<ValueRow>) => void;
  readonly onTakeOut: () => void;
};

const BOX = 'min-h-11 rounded border border-edge bg-paper px-2 font-mono aria-invalid:border-2 aria-invalid:border-scale';

function Row({ id, row, said, meaning, fault, onChange, onTakeOut }: RowProps) {
  return (
    <li className="border-b border-rule py-1.5">
      <div className="flex items-center gap-2">
        <input
          id={id}
          aria-label={`Symbol, ${said}`}
          aria-invalid={fault !== null}
          {...(fault === null ? {} : { 'aria-describedby': `${id}-fault` })}
          value={row.symbol}
          maxLength={8}
          autoCapitalize="characters"
          autoComplete="off"
          spellCheck={false}
          onChange={({ target }) => onChange({ symbol: foldCase(target.value) })}
          className={`${BOX} w-16 text-center font-bold`}
        />
        <input
          aria-label={`Stands for, ${said}`}
          value={row.means}
          maxLength={80}
          inputMode="numeric"
          autoComplete="off"
          onChange={({ target }) => onChange({ means: target.value })}
          className={`${BOX} w-24`}
        />
        <span className="min-w-0 grow text-[15px] leading-snug text-slag">{meaning}</span>
        <button type="button" onClick={onTakeOut} className="grid size-11 shrink-0 cursor-pointer place-items-center rounded border border-edge bg-paper hover:border-graphite">
          <span aria-hidden="true">×</span>
          <span className="sr-only">Take out the {said}</span>
        </button>
      </div>
      <div id={`${id}-fault`}>
        <FaultNote>{fault}</FaultNote>
      </div>
    </li>
  );
}

function Cycle({ name, set, places, onChange }: Pick<Props, 'name' | 'set' | 'places' | 'onChange'>) {
  const { repeatsEvery } = set;
  const count = Object.keys(set.symbols).length;
  return (
    <div className="mt-3">
      <CheckField
        label="The letters come round again"
        checked={repeatsEvery !== undefined}
        onChange={({ target }) => onChange(target.checked ? { ...set, repeatsEvery: Math.max(1, count) } : { kind: 'values', symbols: set.symbols })}
      />
      {repeatsEvery !== undefined && (
        <TextField
          id={places.id('symbolSets', name, 'repeatsEvery')}
          label="After how many years"
          className="max-w-60"
          inputMode="numeric"
          autoComplete="off"
          maxLength={4}
          value={repeatsEvery === 0 ? '' : String(repeatsEvery)}
          error={places.fault('symbolSets', name, 'repeatsEvery')}
          onChange={({ target }) => onChange({ ...set, repeatsEvery: Number(target.value.replace(/\D/g, '')) })}
        />
      )}
    </div>
  );
}

/** Key of a symbol → what it means in the field, where that says more than the number itself. */
function meaningsOf(set: ValuesSet, field: DateField | 'other', { usedFrom, usedTo }: CipherDefinition): ReadonlyMap<string, string> {
  const saysMore = field === 'month' || field === 'quarter' || (field === 'year' && set.repeatsEvery !== undefined && set.repeatsEvery > 0);
  const isKnown = field !== 'year' || (parseDay(usedFrom).ok && (usedTo === null || parseDay(usedTo).ok));
  if (!saysMore || !isKnown) return new Map();
  return new Map(symbolLines(set, field, { from: usedFrom, to: usedTo }, today()).map(({ symbol, means }) => [symbol, means]));
}
