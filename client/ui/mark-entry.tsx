import { useId, useLayoutEffect, useRef, useState } from 'react';
import type { ChangeEvent, KeyboardEvent, MouseEvent, SyntheticEvent } from 'react';
import { Icon } from './icon.tsx';
import { amend, caretPlace, readTyped } from './mark-text.ts';
import type { TypedTile } from './mark-text.ts';
import { MarkTile } from './mark-tile.tsx';
import { PlateBrackets } from './plate-brackets.tsx';
import type { Division } from './plate-brackets.tsx';
import { plateColumns } from './plate-columns.ts';

/** Empty places shown on a bare plate, so that it looks like something to fill. */
const PLACES = 5;

const KEYS = [
  { token: '?', face: '?', word: 'can’t be read' },
  { token: '[', face: '[OD]', word: 'one of these' },
  { token: '-', face: '–', word: 'a gap' },
  { token: '*', face: '*', word: 'broken away' },
] as const;

type Props = {
  readonly label: string;
  readonly value: string;
  readonly onChange: (text: string) => void;
  /** What is wrong with the mark as it stands. */
  readonly fault?: string | null;
  readonly divisions?: readonly Division[];
  /** The glyph the text speaks of. */
  readonly lit?: number | null;
};

type Selection = { readonly start: number; readonly end: number };

/**
 * The mark plate to type on: one real text box holding the mark notation, lying unseen over the plate that draws it.
 * So a phone opens its keyboard, paste and undo work, and a screen reader has one labelled field.
 */
export function MarkEntry({ label, value, onChange, fault = null, divisions = [], lit = null }: Props) {
  const id = useId();
  const input = useRef<HTMLInputElement>(null);
  const tileRow = useRef<HTMLSpanElement>(null);
  const scroller = useRef<HTMLDivElement>(null);
  const caretToSet = useRef<number | null>(null);
  const [selection, setSelection] = useState<Selection>({ start: value.length, end: value.length });
  const [focused, setFocused] = useState(false);

  useLayoutEffect(() => {
    const caret = caretToSet.current;
    if (caret === null) return;
    caretToSet.current = null;
    input.current?.setSelectionRange(caret, caret);
    setSelection({ start: caret, end: caret });
  }, [value]);

  useLayoutEffect(() => {
    if (focused) keepInView(scroller.current);
  }, [focused, selection]);

  const accept = (typed: string, caret: number) => {
    const amended = amend({ text: value, ...selection }, typed, caret);
    caretToSet.current = amended.caret;
    setSelection({ start: amended.caret, end: amended.caret });
    onChange(amended.text);
  };
  const press = (token: string) => {
    const { start, end } = focused ? selection : { start: value.length, end: value.length };
    input.current?.focus();
    const amended = amend({ text: value, start, end }, value.slice(0, start) + token + value.slice(end), start + token.length);
    caretToSet.current = amended.caret;
    onChange(amended.text);
  };
  const select = (start: number, end: number) => {
    input.current?.setSelectionRange(start, end);
    setSelection({ start, end });
  };
  const onKeyDown = (event: KeyboardEvent<HTMLInputElement>) => {
    if (event.key !== 'Enter') return;
    const place = caretPlace(value, readTyped(value), selection.end);
    const tile = place.kind === 'inside' ? readTyped(value).tiles[place.tile] : undefined;
    if (tile === undefined) return;
    event.preventDefault();
    if (tile.text.endsWith(']')) select(tile.end, tile.end);
    else accept(`${value.slice(0, tile.end)}]${value.slice(tile.end)}`, tile.end + 1);
  };
  const onClick = (event: MouseEvent<HTMLInputElement>) => {
    const tile = tileAt(tileRow.current, event.clientX, readTyped(value).tiles);
    if (tile === null) select(value.length, value.length);
    else select(tile.start, tile.end);
  };

  return (
    <div>
      <label htmlFor={id} className="mb-1 block text-slag">
        {label}
      </label>
      <div className="plate-holder plate-holder-entry" style={{ '--units': Math.max(unitsOf(value), PLACES) }}>
        <div ref={scroller} className="plate-scroller">
        <div className={`plate plate-entry ${fault === null ? '' : 'is-faulty'}`}>
          {value === '' && (
            <span aria-hidden="true" className="plate-invitation">
              Type it here, as it stands
            </span>
          )}
          <Tiles value={value} selection={focused ? selection : null} lit={lit} rowRef={tileRow} />
          <input
            ref={input}
            id={id}
            value={value}
            onChange={(event: ChangeEvent<HTMLInputElement>) => accept(event.target.value, event.target.selectionStart ?? event.target.value.length)}
            onSelect={(event: SyntheticEvent<HTMLInputElement>) => {
              const { selectionStart, selectionEnd } = event.currentTarget;
              if (selectionStart !== null && selectionEnd !== null) setSelection({ start: selectionStart, end: selectionEnd });
            }}
            onKeyDown={onKeyDown}
            onClick={onClick}
            onFocus={() => setFocused(true)}
            onBlur={() => setFocused(false)}
            aria-describedby={`${id}-how`}
            aria-invalid={fault !== null}
            className="plate-input"
            type="text"
            inputMode="text"
            enterKeyHint="done"
            autoCapitalize="characters"
            autoComplete="off"
            autoCorrect="off"
            spellCheck={false}
          />
        </div>
        {divisions.length > 0 && <PlateBrackets divisions={divisions} columns={columnsOf(value)} />}
        </div>
      </div>
      <p id={`${id}-how`} className="sr-only">
        {fault ?? 'Letters and figures as you see them. Question mark: can’t be read. Square brackets: one of these. Hyphen: a gap. Star: broken away.'}
      </p>
      <div className="no-print mt-3 grid grid-cols-4 gap-2 roomy:flex roomy:flex-wrap" role="group" aria-label="Put on the plate">
        {KEYS.map(({ token, face, word }) => (
          <button
            key={token}
            type="button"
            onPointerDown={(event) => event.preventDefault()}
            onClick={() => press(token)}
            className="flex min-h-14 cursor-pointer flex-col items-center justify-center gap-x-2 rounded border border-edge bg-paper px-1 text-[14px] leading-tight hover:border-graphite roomy:min-h-11 roomy:flex-row roomy:px-3 roomy:text-[15px]"
          >
            <span aria-hidden="true" className="font-mono text-[17px]">
              {face}
            </span>
            {word}
          </button>
        ))}
      </div>
      {fault !== null && (
        <p className="mt-2 flex items-center gap-2 font-semibold text-scale" aria-hidden="true">
          <Icon name="warning" /> {fault}
        </p>
      )}
    </div>
  );
}

function Tiles({
  value,
  selection,
  lit,
  rowRef,
}: {
  readonly value: string;
  readonly selection: Selection | null;
  readonly lit: number | null;
  readonly rowRef: React.RefObject<HTMLSpanElement | null>;
}) {
  const mark = readTyped(value);
  const columns = plateColumns(mark.tiles.length, mark.gaps);
  const isChosen = (tile: TypedTile) => selection !== null && selection.start < selection.end && selection.start < tile.end && tile.start < selection.end;
  const caret = selection !== null && selection.start === selection.end ? caretPlace(value, mark, selection.end) : null;
  const caretLine =
    caret?.kind !== 'between' ? null : caret.pastGap || caret.place === 0 ? columns.lineBefore(caret.place) : columns.lineAfter(caret.place - 1);
  const spare = Math.max(0, PLACES - mark.tiles.length);
  return (
    <span ref={rowRef} aria-hidden="true" className="plate-row" style={{ gridTemplateColumns: [columns.template, ...Array.from({ length: spare }, () => 'var(--tile)'), '0'].join(' ') }}>
      {mark.tiles.map((tile, position) => (
        <span
          key={position}
          data-tile={position}
          className={`plate-tile ${isChosen(tile) || (caret?.kind === 'inside' && caret.tile === position) ? 'is-chosen' : ''} ${position === lit ? 'is-lit' : ''}`}
          style={{ gridColumn: columns.lineBefore(position) }}
        >
          {tile.glyph === null ? <span className="plate-strange">{tile.text.startsWith('[') ? '[ ]' : tile.text}</span> : <MarkTile glyph={tile.glyph} />}
        </span>
      ))}
      {Array.from({ length: spare }, (_, place) => (
        <span key={`place ${place}`} className="plate-tile plate-place" style={{ gridColumn: columns.lineBefore(mark.tiles.length) + place }} />
      ))}
      {caretLine !== null && <span className="plate-caret" style={{ gridColumn: caretLine }} />}
    </span>
  );
}

function columnsOf(value: string) {
  const { tiles, gaps } = readTyped(value);
  return plateColumns(tiles.length, gaps);
}

function unitsOf(value: string): number {
  return columnsOf(value).units;
}

/** A mark longer than the plate is wide moves along under the caret. */
function keepInView(scroller: HTMLElement | null) {
  const spot = scroller?.querySelector('.plate-caret, .is-chosen')?.getBoundingClientRect();
  if (scroller === null || spot === undefined) return;
  const { left, right } = scroller.getBoundingClientRect();
  const air = 32;
  if (spot.right > right - air) scroller.scrollLeft += spot.right - right + air;
  if (spot.left < left + air) scroller.scrollLeft -= left + air - spot.left;
}

/** The tile under a finger, or null right of the last one. */
function tileAt(row: HTMLElement | null, x: number, tiles: readonly TypedTile[]): TypedTile | null {
  const drawn = row?.querySelectorAll<HTMLElement>('[data-tile]') ?? [];
  for (const element of drawn) {
    const { left, right } = element.getBoundingClientRect();
    if (left <= x && x < right) return tiles[Number(element.dataset['tile'])] ?? null;
  }
  return null;
}
