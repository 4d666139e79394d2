import type { DigitsSet } from '#domain/ciphers/definition.ts';
import { foldCase } from '#domain/marks/glyphs.ts';
import { KEY_ORDER } from './key-word.ts';
import { recordOf, rowsOf } from './symbol-rows.ts';

/** The symbols of one figure, run together: `B`, or `BX` where two stand for it. */
export function symbolsOfDigit({ symbols }: DigitsSet, digit: string): string {
  return rowsOf(symbols)
    .filter(({ value }) => value === digit)
    .map(({ symbol }) => symbol)
    .join('');
}

/** The same set with these symbols for one figure, a character each. A symbol that already stands for another figure is kept, as a fault. */
export function withDigitSymbols(set: DigitsSet, digit: string, typed: string): DigitsSet {
  const others = rowsOf(set.symbols).filter(({ value }) => value !== digit);
  const own = Array.from(foldCase(typed).replace(/\s/g, '')).map((symbol) => ({ symbol, value: digit }));
  return { ...set, symbols: recordOf([...others, ...own]) };
}

/** The set without its repeater, or with another. */
export function withRepeater({ kind, symbols }: DigitsSet, typed: string): DigitsSet {
  const repeater = foldCase(typed).replace(/\s/g, '');
  return repeater === '' ? { kind, symbols } : { kind, symbols, repeater };
}

/** The key word as far as it was typed: `BLOC` where 1 to 4 have a letter each and the rest none; null where the set is no such word. */
export function keyTyped(set: DigitsSet): string | null {
  const letters = KEY_ORDER.map((digit) => symbolsOfDigit(set, digit));
  const end = letters.indexOf('');
  const typed = end < 0 ? letters : letters.slice(0, end);
  const isWord = typed.every((letter) => letter.length === 1) && letters.slice(typed.length).every((letter) => letter === '');
  return isWord ? typed.join('') : null;
}
