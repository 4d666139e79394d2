import { foldCase } from '#domain/marks/glyphs.ts';

/**
 * Symbols of a set as the bench edits them: rows in which the same symbol may stand twice for a while. A definition keeps them under
 * their names, and a name is there once; so the second row of a symbol is kept under another spelling of it (`b`, `Ｂ`), which the
 * register folds into the first and refuses until one of the two is mended. Where the spellings run out, spaces are put behind it, which
 * the register refuses too.
 */
export type SymbolRow<Value> = { readonly symbol: string; readonly value: Value };

/** Full width stands as far above ASCII. */
const TO_FULL_WIDTH = 0xfee0;

const SPELLINGS: readonly ((symbol: string) => string)[] = [
  (symbol) => symbol,
  (symbol) => symbol.toLowerCase(),
  fullWidth,
  (symbol) => fullWidth(symbol.toLowerCase()),
];

/** The keys the rows are kept under, in their order: the symbol itself the first time, then its other spellings. */
export function keysOf(rows: readonly { readonly symbol: string }[]): readonly string[] {
  const taken = new Set<string>();
  return rows.map(({ symbol }) => {
    const key = freeSpelling(foldCase(symbol).trim(), taken);
    taken.add(key);
    return key;
  });
}

/** The rows as a definition keeps them. */
export function recordOf<Value>(rows: readonly SymbolRow<Value>[]): Readonly<Record<string, Value>> {
  const keys = keysOf(rows);
  return Object.fromEntries(rows.map(({ value }, place) => [keys[place] ?? '', value]));
}

/** The rows of a kept set, each symbol in its plain spelling. */
export function rowsOf<Value>(symbols: Readonly<Record<string, Value>>): readonly SymbolRow<Value>[] {
  return Object.entries(symbols).map(([key, value]) => ({ symbol: foldCase(key).trim(), value }));
}

function freeSpelling(symbol: string, taken: ReadonlySet<string>): string {
  const spelled = SPELLINGS.map((spell) => spell(symbol)).find((spelling) => !taken.has(spelling));
  if (spelled !== undefined) return spelled;
  let padded = `${symbol} `;
  while (taken.has(padded)) padded += ' ';
  return padded;
}

function fullWidth(symbol: string): string {
  return symbol.replace(/[!-~]/g, (character) => String.fromCodePoint((character.codePointAt(0) ?? 0) + TO_FULL_WIDTH));
}
