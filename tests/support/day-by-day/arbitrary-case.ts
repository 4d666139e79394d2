import fc from 'fast-check';
import {
  WEEK_RULES,
  type CipherDefinition,
  type CipherException,
  type DateField,
  type DatedField,
  type FieldDefinition,
  type FieldWidth,
  type SymbolSet,
} from '#domain/ciphers/definition.ts';
import { BREAK_CHARACTERS } from '#domain/marks/reading.ts';
import { dayNumber, isoText } from './calendar-by-day.ts';
import { spellingsOn, type Texts } from './spellings-by-day.ts';

/** A cipher, a day of its life, a mark cast that day, and the mark as somebody read it. */
export type Case = {
  readonly definition: CipherDefinition;
  readonly day: number;
  readonly texts: Texts;
  /** In the mark notation. */
  readonly mark: string;
  /** Whether all that was done to the mark leaves the truth possible. */
  readonly honest: boolean;
  readonly asOf: number;
  readonly limits: { readonly from?: number; readonly to?: number };
  readonly lookAlikes: boolean;
};

const LETTERS = 'ABCDEFGHIJKLMNOPQRSTUVWXYZ';

const LAYOUTS: readonly (readonly DateField[])[] = [
  ['month', 'day', 'year'],
  ['year', 'month', 'day'],
  ['day', 'month', 'year'],
  ['year', 'month'],
  ['year', 'week'],
  ['week', 'year', 'day'],
  ['year', 'dayOfYear'],
  ['dayOfYear', 'year'],
  ['year'],
  ['quarter', 'year'],
  ['quarter', 'year', 'day'],
  ['year', 'month', 'week'],
  ['month', 'week', 'day', 'year'],
  ['dayOfYear', 'month'],
  ['month', 'day'],
  ['week'],
  ['day'],
];

const WIDTHS: Readonly<Record<DateField, readonly FieldWidth[]>> = {
  year: [1, 2, 4, [1, 2], [2, 4], [1, 4], 3],
  quarter: [1],
  month: [2, [1, 2]],
  week: [2, [1, 2]],
  day: [2, [1, 2]],
  dayOfYear: [3, [1, 3]],
};

const RANGES: Readonly<Record<DateField, readonly [number, number]>> = {
  year: [0, 0],
  quarter: [1, 4],
  month: [1, 12],
  week: [1, 53],
  day: [1, 31],
  dayOfYear: [1, 366],
};

/** Ten or more letters for the ten digits, some digits with two, perhaps a repeater. */
const digitsSet: fc.Arbitrary<SymbolSet> = fc
  .record({ letters: fc.shuffledSubarray([...LETTERS], { minLength: 14, maxLength: 14 }), spare: fc.nat(3), repeater: fc.boolean() })
  .map(({ letters, spare, repeater }) => ({
    kind: 'digits',
    symbols: Object.fromEntries(letters.slice(0, 10 + spare).map((letter, index) => [letter, String((index * 7) % 10)])),
    ...(repeater ? { repeater: letters[13]! } : {}),
  }));

/** Letters, or pairs of glyphs, for a field's numbers; some symbols stand for several, some numbers have several or none. */
function valuesSet(field: DateField, firstYear: number): fc.Arbitrary<SymbolSet> {
  const [least, greatest] = field === 'year' ? [firstYear - 2, firstYear + 12] : RANGES[field];
  const numbers = Array.from({ length: Math.min(greatest - least + 1, 31) }, (_, index) => least + index);
  const symbols = [...LETTERS, ...[...'0123456'].map((figure) => `Z${figure}`), ...[...'ABCDEFGHIJK'].map((letter) => `${letter}Q`)];
  return fc
    .record({
      symbols: fc.shuffledSubarray(symbols, { minLength: numbers.length, maxLength: numbers.length }),
      shared: fc.array(fc.tuple(fc.nat(numbers.length - 1), fc.nat(numbers.length - 1)), { maxLength: 6 }),
      cycle: fc.option(fc.integer({ min: 1, max: 9 }), { nil: undefined }),
    })
    .map(({ symbols: chosen, shared, cycle }) => {
      const entries = chosen.map((symbol, index): [string, number | number[]] => [symbol, numbers[index]!]);
      for (const [symbol, number] of shared) entries[symbol]![1] = [entries[symbol]![1], numbers[number]!].flat();
      return {
        kind: 'values',
        symbols: Object.fromEntries(entries),
        ...(field === 'year' && cycle !== undefined ? { repeatsEvery: cycle } : {}),
      };
    });
}

type Drawn = { readonly field: FieldDefinition; readonly set: SymbolSet | null };

/** Only week fields have a rule. */
function weekRuleFor(field: DateField): fc.Arbitrary<Pick<DatedField, 'week'>> {
  return field === 'week' ? fc.constantFrom(undefined, ...WEEK_RULES).map((week) => (week === undefined ? {} : { week })) : fc.constant({});
}

function datedField(field: DateField, firstYear: number): fc.Arbitrary<Drawn> {
  const symbols = `${field} set`;
  const inDigits = fc
    .record({ width: fc.constantFrom(...WIDTHS[field]), numerals: fc.boolean(), set: digitsSet, rule: weekRuleFor(field) })
    .map(({ width, numerals, set, rule }): Drawn => ({
      field: { field, symbols: numerals ? 'numerals' : symbols, width, ...rule },
      set: numerals ? null : set,
    }));
  const inValues = fc
    .record({ set: valuesSet(field, firstYear), rule: weekRuleFor(field) })
    .map(({ set, rule }): Drawn => ({ field: { field, symbols, width: [1, 2], ...rule }, set }));
  return fc.oneof(inDigits, inValues);
}

const extraField: fc.Arbitrary<Drawn> = fc.oneof(
  fc
    .record({ name: fc.constantFrom('shift', undefined), width: fc.constantFrom<FieldWidth[]>(1, [1, 2]), repeater: fc.boolean() })
    .map(({ name, width, repeater }): Drawn => ({
      field: { field: 'other', symbols: `${name ?? 'plain'} marks`, width, ...(name === undefined ? {} : { name }) },
      set: { kind: 'digits', symbols: { A: '1', B: '2', 7: '3' }, ...(repeater ? { repeater: 'X' } : {}) },
    })),
  fc.constantFrom<Drawn[]>(
    { field: { field: 'other', symbols: 'hands', name: 'hand', width: [1, 2] }, set: { kind: 'values', symbols: { L: 1, R: 2, RH: 3 } } },
    { field: { field: 'literal', text: 'F' }, set: null },
    { field: { field: 'literal', text: '-' }, set: null },
    { field: { field: 'literal', text: 'a-b' }, set: null },
  ),
);

const plainCipher: fc.Arbitrary<CipherDefinition> = fc
  .record({
    layout: fc.constantFrom(...LAYOUTS),
    from: fc.integer({ min: dayNumber('1550-01-01'), max: dayNumber('2190-12-31') }),
    length: fc.oneof({ weight: 3, arbitrary: fc.integer({ min: 0, max: 420 }) }, { weight: 1, arbitrary: fc.integer({ min: 420, max: 1500 }) }),
    extras: fc.array(fc.tuple(extraField, fc.nat(6)), { maxLength: 2 }),
    yearStart: fc.option(fc.constantFrom('05-29', '07-01', '12-31', '01-01', '02-28'), { nil: undefined, freq: 3 }),
    inUse: fc.boolean(),
  })
  .chain(({ layout, from, length, extras, yearStart, inUse }) =>
    fc.tuple(...layout.map((field) => datedField(field, Number(isoText(from).slice(0, 4))))).map((dated): CipherDefinition => {
      const drawn: Drawn[] = [...dated];
      for (const [extra, place] of extras) drawn.splice(Math.min(place, drawn.length), 0, extra);
      const names = new Set<string>();
      const kept = drawn.filter(({ field }) => {
        const name = field.field === 'other' ? (field.name ?? 'other') : field.field;
        const isNew = field.field === 'literal' || !names.has(name);
        names.add(name);
        return isNew;
      });
      return {
        fields: kept.map(({ field }) => field),
        symbolSets: Object.fromEntries(
          kept.flatMap(({ field, set }) => (field.field === 'literal' || set === null ? [] : [[field.symbols, set] as const])),
        ),
        ...(yearStart === undefined ? {} : { yearStart }),
        usedFrom: isoText(from),
        usedTo: inUse ? null : isoText(from + length),
      };
    }),
  );

/** Exceptions for texts that the cipher does cast, mostly on days of its life. */
function exceptionFor(definition: CipherDefinition, last: number): fc.Arbitrary<CipherException | null> {
  const first = dayNumber(definition.usedFrom);
  return fc
    .record({
      day: fc.integer({ min: first, max: last }),
      pick: fc.nat(),
      start: fc.integer({ min: first - 30, max: last }),
      length: fc.oneof(fc.nat(3), fc.nat(60)),
      keep: fc.array(fc.boolean(), { minLength: 7, maxLength: 7 }),
      replaces: fc.constantFrom(true, false, undefined),
    })
    .map(({ day, pick, start, length, keep, replaces }) => {
      const spelled = spellingsOn(day, definition);
      const texts = spelled[pick % Math.max(1, spelled.length)];
      if (texts === undefined) return null;
      const others = definition.fields.filter((field) => field.field === 'other');
      const fields: Partial<Record<DateField | 'other', string>> = {};
      let at = 0;
      definition.fields.forEach((field, index) => {
        if (field.field === 'literal') {
          at += field.text.split(/[^A-Za-z0-9]+/).filter((piece) => piece !== '').length;
          return;
        }
        const text = texts[at]!;
        at += 1;
        if (field.field === 'other' && others.length > 1 && field.name !== undefined) return;
        if (keep[index % keep.length]) fields[field.field] = text;
      });
      if (Object.keys(fields).length === 0) return null;
      return { fields, from: isoText(start), to: isoText(start + length), ...(replaces === undefined ? {} : { replaces }) };
    });
}

/** Ciphers of every kind the definition allows, small enough to go through day by day. */
export const arbitraryCipher: fc.Arbitrary<{ readonly definition: CipherDefinition; readonly last: number }> = plainCipher.chain(
  (definition) => {
    const last = definition.usedTo === null ? dayNumber(definition.usedFrom) + 300 : dayNumber(definition.usedTo);
    return fc.array(exceptionFor(definition, last), { maxLength: 3 }).map((drawn) => {
      const exceptions = drawn.filter((exception) => exception !== null);
      return { definition: exceptions.length === 0 ? definition : { ...definition, exceptions }, last };
    });
  },
);

type Damage = 'keep' | 'unread' | 'oneOf' | 'wrong';

/** A cipher, a day, a mark of that day, and damage of every kind. */
export const arbitraryCase: fc.Arbitrary<Case> = arbitraryCipher
  .chain(({ definition, last }) => {
    const first = dayNumber(definition.usedFrom);
    return fc.record({
      definition: fc.constant(definition),
      day: fc.integer({ min: first, max: last }),
      asOf: fc.constant(last),
      pick: fc.nat(),
      aimAtException: fc.boolean(),
      damage: fc.array(fc.constantFrom<Damage[]>('keep', 'keep', 'keep', 'unread', 'oneOf', 'wrong'), { minLength: 32, maxLength: 32 }),
      hurt: fc.boolean(),
      lies: fc.integer({ min: 0, max: 9 }).map((die) => die === 0),
      strangers: fc.array(fc.constantFrom(...LETTERS, ...'0123456789'), { minLength: 64, maxLength: 64 }),
      star: fc.option(fc.tuple(fc.nat(12), fc.nat(3)), { nil: undefined, freq: 4 }),
      gaps: fc.array(fc.boolean(), { minLength: 16, maxLength: 16 }),
      seesGaps: fc.boolean(),
      breakWith: fc.constantFrom(...BREAK_CHARACTERS),
      limits: fc.oneof(
        { weight: 3, arbitrary: fc.constant({}) },
        { weight: 1, arbitrary: fc.record({ from: fc.integer({ min: first - 40, max: last }) }) },
        { weight: 1, arbitrary: fc.record({ from: fc.integer({ min: first, max: last }), to: fc.integer({ min: first, max: last + 9 }) }) },
      ),
      lookAlikes: fc.integer({ min: 0, max: 3 }).map((die) => die === 0),
    });
  })
  .map((drawn): Case | null => {
    const { definition, asOf, limits, lookAlikes } = drawn;
    const [exception] = drawn.aimAtException ? (definition.exceptions ?? []) : [];
    const day = exception === undefined ? drawn.day : Math.min(asOf, Math.max(dayNumber(definition.usedFrom), dayNumber(exception.from)));
    const spelled = spellingsOn(day, definition);
    // What exceptions add comes last.
    const texts = exception === undefined ? spelled[drawn.pick % Math.max(1, spelled.length)] : spelled.at(-1);
    if (texts === undefined) return null;
    const { mark, honest } = damaged(texts, drawn);
    return { definition, day, texts, mark, honest, asOf, limits, lookAlikes };
  })
  .filter((drawn): drawn is Case => drawn !== null);

function damaged(
  texts: Texts,
  harm: {
    readonly damage: readonly Damage[];
    readonly hurt: boolean;
    readonly lies: boolean;
    readonly strangers: readonly string[];
    readonly star: readonly [number, number] | undefined;
    readonly gaps: readonly boolean[];
    readonly seesGaps: boolean;
    readonly breakWith: string;
  },
): { readonly mark: string; readonly honest: boolean } {
  const cast = texts.join('');
  const ends = new Set<number>();
  let end = 0;
  for (const text of texts) ends.add((end += text.length));
  const [starAt, starLength] = harm.star ?? [-1, 0];
  let honest = true;
  let mark = '';
  for (let place = 0; place <= cast.length; place += 1) {
    const inStar = place > starAt && place < starAt + starLength;
    if (ends.has(place) && place < cast.length && !inStar && harm.seesGaps && harm.gaps[place % harm.gaps.length]) mark += harm.breakWith;
    if (place === starAt && starAt <= cast.length) mark += '*';
    const glyph = cast[place];
    if (glyph === undefined || (place >= starAt && place < starAt + starLength)) continue;
    const damage = harm.hurt ? harm.damage[place % harm.damage.length] : 'keep';
    const strangers = harm.strangers.slice(place, place + 2);
    if (damage === 'unread') mark += '?';
    else if (damage === 'oneOf') mark += `[${[glyph, ...strangers].sort().join('')}]`;
    else if (damage === 'wrong' && harm.lies) {
      mark += strangers[0]!;
      honest &&= strangers[0] === glyph;
    } else mark += glyph;
  }
  return { mark, honest };
}
