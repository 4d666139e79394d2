import type { ValuesSet } from '#domain/ciphers/definition.ts';
import { keysOf, recordOf, rowsOf } from './symbol-rows.ts';

/** A symbol and what it stands for, as typed: `1911`, or `1, 13` for either of two. */
export type ValueRow = { readonly symbol: string; readonly means: string };

/** The rows of a set in the order of what they stand for. */
export function valueRowsOf({ symbols }: ValuesSet): readonly ValueRow[] {
  return rowsOf(symbols)
    .map(({ symbol, value }) => ({ symbol, numbers: typeof value === 'number' ? [value] : value }))
    .toSorted((one, other) => (one.numbers[0] ?? Number.MAX_SAFE_INTEGER) - (other.numbers[0] ?? Number.MAX_SAFE_INTEGER))
    .map(({ symbol, numbers }) => ({ symbol, means: numbers.join(', ') }));
}

/** The symbols the rows make, and the key each row is kept under. What is no number yet counts as nothing said. */
export function symbolsOfRows(rows: readonly ValueRow[]): { readonly symbols: ValuesSet['symbols']; readonly keys: readonly string[] } {
  return { symbols: recordOf(rows.map(({ symbol, means }) => ({ symbol, value: valueOf(means) }))), keys: keysOf(rows) };
}

/** Whether the text is whole numbers with commas, spaces or “or” between them. */
export function isNumbers(means: string): boolean {
  return /^\s*\d+(?:(?:\s*,\s*|\s+or\s+|\s+)\d+)*\s*$/.test(means);
}

/** The number after the last one, for the next row. */
export function nextNumber(rows: readonly ValueRow[]): string {
  const numbers = rows.flatMap(({ means }) => numbersIn(means));
  return numbers.length === 0 ? '1' : String(Math.max(...numbers) + 1);
}

/** Letters that stand for one whole number each, in order and without a gap; null where the set is no such run. */
export function runOf(set: ValuesSet): { readonly letters: string; readonly first: number } | null {
  const rows = valueRowsOf(set);
  const first = Number(rows[0]?.means);
  const isRun = rows.every(({ symbol, means }, place) => symbol.length === 1 && means === String(first + place));
  return rows.length > 0 && isRun ? { letters: rows.map(({ symbol }) => symbol).join(''), first } : null;
}

function valueOf(means: string): number | readonly number[] {
  const numbers = isNumbers(means) ? numbersIn(means) : [];
  const [only] = numbers;
  return numbers.length === 1 && only !== undefined ? only : numbers;
}

function numbersIn(means: string): number[] {
  return (means.match(/\d+/g) ?? []).map(Number);
}
