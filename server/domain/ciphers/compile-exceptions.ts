import { parseDay, type Day } from '../dates/day.ts';
import type { CipherFault, Report } from './cipher-fault.ts';
import type { CompiledException, LiteralPiece, NamedText } from './compiled-cipher.ts';
import { numbersOfText, type CheckedField } from './compile-fields.ts';
import { glyphsOf } from './compile-sets.ts';
import { CIPHER_LIMITS, type CipherDefinition, type CipherException } from './definition.ts';
import { FIELD_WORDS } from './field-numbers.ts';

export type CheckedExceptions = {
  readonly exceptions: readonly CompiledException[];
  /** Index of a field → the texts that exceptions name in it. */
  readonly named: ReadonlyMap<number, readonly NamedText[]>;
};

/** Checks each exception against the fields it names. */
export function compileExceptions(
  definition: CipherDefinition,
  fields: readonly (CheckedField | LiteralPiece)[],
  report: Report,
): CheckedExceptions {
  const listed = definition.exceptions ?? [];
  const named = new Map<number, NamedText[]>();
  if (listed.length > CIPHER_LIMITS.exceptions) {
    report('too-many-exceptions', ['exceptions'], `a cipher has at most ${String(CIPHER_LIMITS.exceptions)} exceptions`);
    return { exceptions: [], named };
  }
  /** A field left out for a fault of its own is not absent. */
  const declared = new Set<string>(definition.fields.map((field) => field.field));
  const exceptions = listed.flatMap((exception, index) => {
    const path = ['exceptions', index];
    const from = checkDay(exception.from, [...path, 'from'], report);
    const to = checkDay(exception.to, [...path, 'to'], report);
    const texts = checkTexts(exception, declared, fields, named, path, report);
    if (from === null || to === null) return [];
    if (from > to) {
      report('ends-before-it-starts', [...path, 'to'], 'the exception ends before it starts');
      return [];
    }
    return [{ span: { from, to }, replaces: exception.replaces ?? true, named: texts }];
  });
  return { exceptions, named };
}

/** A day within the years a definition may speak of. */
export function checkDay(iso: string, path: CipherFault['path'], report: Report): Day | null {
  const day = parseDay(iso);
  if (!day.ok) {
    report('not-a-day', path, day.fault.message);
    return null;
  }
  const year = Number(iso.slice(0, 4));
  if (year >= CIPHER_LIMITS.earliestYear && year <= CIPHER_LIMITS.latestYear) return day.value;
  const years = `${String(CIPHER_LIMITS.earliestYear)} to ${String(CIPHER_LIMITS.latestYear)}`;
  report('outside-years', path, `dates run from ${years}`);
  return null;
}

/** Field index → key of the text the exception wants there; takes the texts up into `named`. */
function checkTexts(
  exception: CipherException,
  declared: ReadonlySet<string>,
  fields: readonly (CheckedField | LiteralPiece)[],
  named: Map<number, NamedText[]>,
  path: CipherFault['path'],
  report: Report,
): ReadonlyMap<number, number> {
  const texts = new Map<number, number>();
  let count = 0;
  for (const [kind, text] of entriesOf(exception.fields)) {
    count += 1;
    const at = [...path, 'fields', kind];
    const index = indexOfField(kind, fields);
    const field = index === null ? undefined : fields[index];
    if (index === null || field === undefined || field.kind === 'literal') {
      if (!declared.has(kind)) report('exception-names-absent-field', at, `this cipher has no such ${FIELD_WORDS[kind]} field`);
      continue;
    }
    const glyphs = glyphsOf(text.slice(0, CIPHER_LIMITS.fieldWidth + 1));
    const numbers = glyphs === null ? null : numbersOfText(field, glyphs);
    if (glyphs === null || numbers === null) {
      report('exception-names-absent-symbol', at, `“${text.slice(0, 20)}” can’t stand in the ${FIELD_WORDS[kind]} field`);
      continue;
    }
    const known = named.get(index) ?? [];
    const spelled = glyphs.join();
    const same = known.find((other) => other.glyphs.join() === spelled);
    const key = same?.key ?? -1 - known.length;
    if (same === undefined) named.set(index, [...known, { glyphs, numbers, key }]);
    texts.set(index, key);
  }
  if (count === 0) report('exception-without-field', [...path, 'fields'], 'an exception names the symbols of one field at least');
  return texts;
}

/** An `other` field is meant where it is the only one, or, among several, where it has no name of its own. */
function indexOfField(kind: NamedField, fields: readonly (CheckedField | LiteralPiece)[]): number | null {
  const indexes = fields.flatMap((field, index) => (field.kind === kind ? [index] : []));
  if (indexes.length <= 1) return indexes[0] ?? null;
  return indexes.find((index) => {
    const field = fields[index];
    return field !== undefined && field.kind === 'other' && field.name === 'other';
  }) ?? null;
}

type NamedField = keyof CipherException['fields'];

const NAMED_FIELDS: readonly NamedField[] = ['year', 'quarter', 'month', 'week', 'day', 'dayOfYear', 'other'];

function entriesOf(fields: CipherException['fields']): readonly (readonly [NamedField, string])[] {
  return NAMED_FIELDS.flatMap((kind) => {
    const text = fields[kind];
    return text === undefined ? [] : [[kind, text] as const];
  });
}
