import type { CipherDefinition, CipherException } from '#domain/ciphers/definition.ts';

/** Edits of the dated departures from the table. Each gives a new definition and leaves the old one as it was. */

export type NamedField = keyof CipherException['fields'];

export function withExceptionAdded(definition: CipherDefinition): CipherDefinition {
  return withExceptions(definition, [...(definition.exceptions ?? []), { fields: {}, from: '', to: '' }]);
}

export function withException(definition: CipherDefinition, place: number, change: Partial<CipherException>): CipherDefinition {
  return withExceptions(definition, (definition.exceptions ?? []).map((one, at) => (at === place ? { ...one, ...change } : one)));
}

/** The symbols that stand in one field; blank takes the field out of the exception. */
export function withExceptionSymbols(definition: CipherDefinition, place: number, field: NamedField, symbols: string): CipherDefinition {
  const { [field]: _, ...others } = definition.exceptions?.[place]?.fields ?? {};
  return withException(definition, place, { fields: symbols === '' ? others : { ...others, [field]: symbols } });
}

export function withoutException(definition: CipherDefinition, place: number): CipherDefinition {
  return withExceptions(definition, (definition.exceptions ?? []).filter((_, at) => at !== place));
}

/** The fields an exception may name: those of the layout, and any it names though they are gone. */
export function namedFields(definition: CipherDefinition, exception: CipherException): readonly NamedField[] {
  const inLayout = definition.fields.flatMap(({ field }) => (field === 'literal' ? [] : [field]));
  const named = NAMED_FIELDS.filter((field) => exception.fields[field] !== undefined);
  return [...new Set([...inLayout, ...named])];
}

const NAMED_FIELDS: readonly NamedField[] = ['year', 'quarter', 'month', 'week', 'day', 'dayOfYear', 'other'];

function withExceptions({ exceptions: _, ...definition }: CipherDefinition, exceptions: readonly CipherException[]): CipherDefinition {
  return exceptions.length === 0 ? definition : { ...definition, exceptions };
}
