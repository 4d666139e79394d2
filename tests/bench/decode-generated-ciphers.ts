import { compileCipher } from '#domain/ciphers/compile.ts';
import type { Entered } from '#domain/ciphers/identify.ts';
import type { CipherDefinition, FieldDefinition, SymbolSet } from '#domain/ciphers/definition.ts';

const LETTERS = 'ABCDEFGHIJKLMNOPQRSTUVWXYZ';

/** As many different ciphers of the kinds in the catalogue, the same ones each time. */
export function generatedCiphers(count: number): readonly Entered[] {
  const draw = numbersFrom(20_261_201);
  return Array.from({ length: count }, (_, index) => {
    const result = compileCipher(KINDS[index % KINDS.length]!(draw));
    if (!result.ok) throw new Error(JSON.stringify(result.fault));
    return { cipher: result.value };
  });
}

type Draw = (below: number) => number;

const KINDS: readonly ((draw: Draw) => CipherDefinition)[] = [
  (draw) => inUse(draw, [dated('month', 'key', [1, 2]), dated('day', 'key', [1, 2]), dated('year', 'key', 2)], { key: tenLetters(draw, 10) }),
  (draw) => inUse(draw, [dated('day', 'key', 2), dated('month', 'key', 2), dated('year', 'key', 2)], { key: tenLetters(draw, 11) }),
  (draw) => inUse(draw, [dated('month', 'months', 1), dated('day', 'numerals', [1, 2]), dated('year', 'numerals', 1)], { months: inOrder(draw, 12, 1) }),
  (draw) => inUse(draw, [dated('year', 'years', 1), dated('week', 'numerals', 2)], { years: { ...inOrder(draw, 20, 1900), repeatsEvery: 20 } as SymbolSet }),
  (draw) => inUse(draw, [dated('dayOfYear', 'numerals', 3), dated('year', 'numerals', 1)], {}),
  (draw) =>
    inUse(draw, [dated('year', 'years', 1), { field: 'other', symbols: 'key', width: 1, name: 'foundry' }, dated('month', 'key', [1, 2])], {
      years: inOrder(draw, 24, 1900 + draw(60)),
      key: tenLetters(draw, 10),
    }),
];

function inUse(draw: Draw, fields: readonly FieldDefinition[], symbolSets: Readonly<Record<string, SymbolSet>>): CipherDefinition {
  const from = 1880 + draw(60);
  return { fields, symbolSets, usedFrom: `${from}-01-01`, usedTo: `${from + 15 + draw(35)}-12-31` };
}

function dated(field: 'year' | 'month' | 'week' | 'day' | 'dayOfYear', symbols: string, width: number | [number, number]): FieldDefinition {
  return { field, symbols, width };
}

function tenLetters(draw: Draw, count: number): SymbolSet {
  const letters = shuffled(draw).slice(0, count);
  const symbols = Object.fromEntries(letters.slice(0, 10).map((letter, index) => [letter, String(index)]));
  return { kind: 'digits', symbols, ...(count > 10 ? { repeater: letters[10]! } : {}) };
}

function inOrder(draw: Draw, count: number, first: number): SymbolSet {
  const letters = shuffled(draw).slice(0, count).sort();
  return { kind: 'values', symbols: Object.fromEntries(letters.map((letter, index) => [letter, first + index])) };
}

function shuffled(draw: Draw): string[] {
  const letters = [...LETTERS];
  for (let index = letters.length - 1; index > 0; index -= 1) {
    const other = draw(index + 1);
    [letters[index], letters[other]] = [letters[other]!, letters[index]!];
  }
  return letters;
}

/** A small generator of even numbers below a bound (Numerical Recipes' linear congruence). */
function numbersFrom(seed: number): Draw {
  let state = seed >>> 0;
  return (below) => {
    state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
    return Math.floor((state / 2 ** 32) * below);
  };
}
