import { createHash } from 'node:crypto';
import { compileCipher } from '#domain/ciphers/compile.ts';
import type { CompiledCipher } from '#domain/ciphers/compiled-cipher.ts';
import { likelihoodOf } from '#domain/ciphers/decode.ts';
import type { CipherDefinition, SymbolSet } from '#domain/ciphers/definition.ts';
import type { Day } from '#domain/dates/day.ts';
import type { DayLimits } from '#domain/ciphers/days-in-use.ts';
import { inTurns } from '#server/services/in-turns.ts';
import { readingOnRecord } from '#server/services/marks/mark-dating.ts';

/** Random keys tried. */
const KEYS_TRIED = 199;

/** A reading and its casting’s years. */
export type DatedCasting = { readonly reading: string; readonly made: DayLimits };

export type ChanceAgreement = {
  /** Marks that have a date within their casting’s years, out of `marks`. */
  readonly agreeing: number;
  readonly marks: number;
  /** Out of `keys` random keys, how many date at least as many marks within their castings’ years. */
  readonly asGood: number;
  readonly keys: number;
  /** Marks that a random key dates within their castings’ years, on the average of all tried. */
  readonly usual: number;
  /** (asGood + 1) / (keys + 1): how often a random key of the same shape does as well. */
  readonly share: number;
};

/**
 * How much of a cipher’s agreement with the record chance alone would give: a permutation test.
 *
 * A mark agrees where it has a date, under the cipher, within the years of the casting it stands on. A random key of the same shape is the
 * definition with the values of each symbol set dealt out anew among the set’s own symbols; fields, widths, days in use and exceptions stay.
 * `KEYS_TRIED` such keys are counted the same way. The share is (keys that do at least as well + 1) / (keys + 1), which counts the
 * definition itself as one of the keys, so that it is never zero and never too small (Phipson and Smyth, "Permutation P-values should never
 * be zero", Statistical Applications in Genetics and Molecular Biology 9, 2010; cited from memory).
 *
 * The keys depend on the definition alone, so the answer is the same every time. `null` where there is nothing to deal out, as a layout in
 * numerals has no key, or no mark to try it on.
 */
export async function chanceAgreement(definition: CipherDefinition, marks: readonly DatedCasting[], asOf: Day): Promise<ChanceAgreement | null> {
  const own = compileCipher(definition);
  const keyed = setsWithAKey(definition);
  if (!own.ok || keyed.length === 0 || marks.length === 0) return null;
  const readings = distinctMarks(marks);
  const agreeing = agreement(own.value, readings, asOf);
  const deal = dealing(definition);
  let asGood = 0;
  let sum = 0;
  await inTurns(Array.from({ length: KEYS_TRIED }, (_, place) => place), () => {
    const key = compileCipher(withRandomKey(definition, keyed, deal));
    const agreed = key.ok ? agreement(key.value, readings, asOf) : 0;
    if (agreed >= agreeing) asGood += 1;
    sum += agreed;
  });
  return { agreeing, marks: marks.length, asGood, keys: KEYS_TRIED, usual: sum / KEYS_TRIED, share: (asGood + 1) / (KEYS_TRIED + 1) };
}

type DistinctMark = { readonly reading: ReturnType<typeof readingOnRecord>; readonly made: DayLimits; readonly times: number };

/** Marks that read alike on castings of the same years are worked out once. */
function distinctMarks(marks: readonly DatedCasting[]): readonly DistinctMark[] {
  const distinct = new Map<string, DistinctMark>();
  for (const { reading, made } of marks) {
    const key = `${reading} ${String(made.from)} ${String(made.to)}`;
    const before = distinct.get(key);
    distinct.set(key, before === undefined ? { reading: readingOnRecord(reading), made, times: 1 } : { ...before, times: before.times + 1 });
  }
  return [...distinct.values()];
}

function agreement(cipher: CompiledCipher, marks: readonly DistinctMark[], asOf: Day): number {
  return marks.reduce((sum, { reading, made, times }) => sum + (likelihoodOf(reading, cipher, { asOf, limits: made }).likelihood > 0 ? times : 0), 0);
}

/** Sets that a date field is written in and that hold more than one value. */
function setsWithAKey(definition: CipherDefinition): readonly string[] {
  const inDates = new Set(definition.fields.flatMap((field) => (field.field === 'literal' || field.field === 'other' ? [] : [field.symbols])));
  return Object.entries(definition.symbolSets).flatMap(([name, set]) => (inDates.has(name) && new Set(Object.values(set.symbols).map(String)).size > 1 ? [name] : []));
}

function withRandomKey(definition: CipherDefinition, keyed: readonly string[], deal: Deal): CipherDefinition {
  const dealt = keyed.map((name): [string, SymbolSet] => [name, dealtAnew(definition.symbolSets[name], deal)]);
  return { ...definition, symbolSets: { ...definition.symbolSets, ...Object.fromEntries(dealt) } };
}

function dealtAnew(set: SymbolSet | undefined, deal: Deal): SymbolSet {
  if (set === undefined) throw new RangeError('A set that a field is written in is missing');
  return set.kind === 'digits' ? { ...set, symbols: dealtAmong(set.symbols, deal) } : { ...set, symbols: dealtAmong(set.symbols, deal) };
}

function dealtAmong<Value>(symbols: Readonly<Record<string, Value>>, deal: Deal): Readonly<Record<string, Value>> {
  const values = deal(Object.values(symbols));
  return Object.fromEntries(Object.keys(symbols).flatMap((symbol, place) => values.slice(place, place + 1).map((value): [string, Value] => [symbol, value])));
}

type Deal = <Value>(values: readonly Value[]) => readonly Value[];

/** Shuffles (Fisher and Yates) that come from the definition alone. */
function dealing(definition: CipherDefinition): Deal {
  const seed = JSON.stringify(definition);
  let draws = 0;
  const below = (count: number): number => {
    draws += 1;
    return createHash('sha256').update(`${seed}\n${draws}`).digest().readUIntBE(0, 6) % count;
  };
  return (values) => {
    const left = [...values];
    return values.flatMap(() => left.splice(below(left.length), 1));
  };
}
