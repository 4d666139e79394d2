import { compileCipher } from '#domain/ciphers/compile.ts';
import type { CompiledCipher } from '#domain/ciphers/compiled-cipher.ts';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { parseReading, type Reading } from '#domain/marks/reading.ts';

/** The three ciphers of the worked examples: invented, as are all their marks. */

/** Month, day and year on the ten letters of a word; a width range for month and day. */
export const TEN: CipherDefinition = {
  fields: [
    { field: 'month', symbols: 'key', width: [1, 2] },
    { field: 'day', symbols: 'key', width: [1, 2] },
    { field: 'year', symbols: 'key', width: 2 },
  ],
  symbolSets: {
    key: { kind: 'digits', symbols: { B: '1', L: '2', O: '3', C: '4', K: '5', P: '6', R: '7', I: '8', N: '9', T: '0' } },
  },
  usedFrom: '1928-01-01',
  usedTo: '1954-12-31',
};

/** Month letter, day, last digit of the year. */
export const HES: CipherDefinition = {
  fields: [
    { field: 'month', symbols: 'letters', width: 1 },
    { field: 'day', symbols: 'numerals', width: [1, 2] },
    { field: 'year', symbols: 'numerals', width: 1 },
  ],
  symbolSets: { letters: { kind: 'values', symbols: numbered('ABCDEFGHJKLM', 1) } },
  usedFrom: '1926-01-01',
  usedTo: '1958-12-31',
};

/** Year letter on a cycle of twenty, then the ISO week. */
export const FEN: CipherDefinition = {
  fields: [
    { field: 'year', symbols: 'letters', width: 1 },
    { field: 'week', symbols: 'numerals', width: 2 },
  ],
  symbolSets: { letters: { kind: 'values', symbols: numbered('ABCDEFGHKLMNPRSTUWXY', 1911), repeatsEvery: 20 } },
  usedFrom: '1911-01-01',
  usedTo: '1962-12-31',
};

/** Each letter stands for the next number, beginning with the first. */
export function numbered(letters: string, first: number): Record<string, number> {
  return Object.fromEntries([...letters].map((letter, index) => [letter, first + index]));
}

export function compiled(definition: CipherDefinition): CompiledCipher {
  const result = compileCipher(definition);
  if (!result.ok) throw new Error(JSON.stringify(result.fault));
  return result.value;
}

export function parsed(mark: string): Reading {
  const result = parseReading(mark);
  if (!result.ok) throw new Error(`${mark}: ${result.fault.message}`);
  return result.value;
}
