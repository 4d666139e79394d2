import { CIPHER_LIMITS } from '#domain/ciphers/definition.ts';
import type { CipherDefinition, FieldDefinition, FieldKind, FieldWidth, SymbolSet } from '#domain/ciphers/definition.ts';

/** Edits of a definition's layout. Each gives a new definition and leaves the old one as it was. */

/** What a field is when it is put in, to be changed from there. */
const FIRST_WIDTHS: Readonly<Record<Exclude<FieldKind, 'literal'>, FieldWidth>> = {
  year: 2,
  quarter: 1,
  month: [1, 2],
  week: 2,
  day: [1, 2],
  dayOfYear: 3,
  other: 1,
};

export type SymbolSetKind = SymbolSet['kind'];

function freshField(kind: FieldKind): FieldDefinition {
  if (kind === 'literal') return { field: 'literal', text: '' };
  return { field: kind, symbols: 'numerals', width: FIRST_WIDTHS[kind] };
}

export function withFieldAdded(definition: CipherDefinition, kind: FieldKind): CipherDefinition {
  return { ...definition, fields: [...definition.fields, freshField(kind)] };
}

export function withField(definition: CipherDefinition, place: number, field: FieldDefinition): CipherDefinition {
  return { ...definition, fields: definition.fields.map((one, at) => (at === place ? field : one)) };
}

/** The field says something else from now on; what it is written in stays where both are written in something. */
export function withKind(definition: CipherDefinition, place: number, kind: FieldKind): CipherDefinition {
  const field = definition.fields[place];
  if (field === undefined || field.field === kind) return definition;
  const fresh = freshField(kind);
  const isWritten = field.field !== 'literal' && fresh.field !== 'literal' && field.symbols !== 'numerals';
  return withField(definition, place, isWritten ? { ...fresh, symbols: field.symbols, width: field.width } : fresh);
}

export function withoutField(definition: CipherDefinition, place: number): CipherDefinition {
  return { ...definition, fields: definition.fields.filter((_, at) => at !== place) };
}

/** The field stands earlier or later by one place; at either end nothing changes. */
export function withFieldMoved(definition: CipherDefinition, place: number, by: -1 | 1): CipherDefinition {
  const fields = [...definition.fields];
  const moved = fields[place];
  const other = fields[place + by];
  if (moved === undefined || other === undefined) return definition;
  fields[place + by] = moved;
  fields[place] = other;
  return { ...definition, fields };
}

/** Width as it is written: one number where least and most are the same. */
function widthFrom(least: number, most: number): FieldWidth {
  return least === most ? least : [least, most];
}

/** Least and most changed by a step, each pushing the other along; within what a field can have. */
export function widthStepped(width: FieldWidth, end: 'least' | 'most', by: -1 | 1): FieldWidth {
  const [least, most] = typeof width === 'number' ? [width, width] : width;
  const stepped = Math.min(CIPHER_LIMITS.fieldWidth, Math.max(1, (end === 'least' ? least : most) + by));
  return end === 'least' ? widthFrom(stepped, Math.max(stepped, most)) : widthFrom(Math.min(least, stepped), stepped);
}

/** Names that sets are made under. */
const SET_NAMES: Readonly<Record<SymbolSetKind, string>> = { digits: 'key', values: 'letters' };
const NAMES_BY_FIELD: Readonly<Partial<Record<FieldKind, string>>> = {
  year: 'years',
  quarter: 'quarters',
  month: 'months',
  week: 'weeks',
  day: 'days',
};

/** The field is written in a new set of this kind, made for it and still without symbols. */
export function withNewSet(definition: CipherDefinition, place: number, kind: SymbolSetKind): CipherDefinition {
  const field = definition.fields[place];
  if (field === undefined || field.field === 'literal') return definition;
  const name = freeName((kind === 'values' ? NAMES_BY_FIELD[field.field] : undefined) ?? SET_NAMES[kind], definition.symbolSets);
  const set: SymbolSet = kind === 'digits' ? { kind, symbols: {} } : { kind, symbols: {} };
  const width = kind === 'values' ? 1 : field.width;
  return { ...withField(definition, place, { ...field, symbols: name, width }), symbolSets: { ...definition.symbolSets, [name]: set } };
}

export function withSet(definition: CipherDefinition, name: string, set: SymbolSet): CipherDefinition {
  return { ...definition, symbolSets: { ...definition.symbolSets, [name]: set } };
}

export function withoutSet(definition: CipherDefinition, name: string): CipherDefinition {
  return { ...definition, symbolSets: Object.fromEntries(Object.entries(definition.symbolSets).filter(([one]) => one !== name)) };
}

/** Fields written in a set. */
export function fieldsIn(definition: CipherDefinition, name: string): readonly Exclude<FieldDefinition, { readonly field: 'literal' }>[] {
  return definition.fields.flatMap((field) => (field.field !== 'literal' && field.symbols === name ? [field] : []));
}

function freeName(wanted: string, sets: CipherDefinition['symbolSets']): string {
  if (!(wanted in sets)) return wanted;
  let number = 2;
  while (`${wanted} ${number}` in sets) number += 1;
  return `${wanted} ${number}`;
}
