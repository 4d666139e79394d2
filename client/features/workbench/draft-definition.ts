import { z } from 'zod';
import { DATE_FIELDS, WEEK_RULES } from '#domain/ciphers/definition.ts';
import type { CipherDefinition, FieldDefinition, SymbolSet } from '#domain/ciphers/definition.ts';

/** What stands on the bench before anything was laid out: nothing is said yet, not even whether it is still in use. */
export const BLANK: CipherDefinition = { fields: [], symbolSets: {}, usedFrom: '', usedTo: '' };

const Text = z.string().catch('');
const SetName = z.string().catch('numerals');
const Width = z.union([z.number(), z.tuple([z.number(), z.number()])]).catch(1);

const Field: z.ZodType<FieldDefinition> = z.discriminatedUnion('field', [
  z.object({ field: z.literal('literal'), text: Text }),
  z.object({ field: z.literal('other'), symbols: SetName, width: Width, name: z.string().optional().catch(undefined) }),
  z.object({ field: z.enum(DATE_FIELDS), symbols: SetName, width: Width, week: z.enum(WEEK_RULES).optional().catch(undefined) }),
]);

const Digit = z.union([z.string(), z.number().transform(String)]).catch('');
const Value = z.union([z.number(), z.array(z.number())]).catch([]);

const Set: z.ZodType<SymbolSet> = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('digits'), symbols: z.record(z.string(), Digit).catch({}), repeater: z.string().optional().catch(undefined) }),
  z.object({ kind: z.literal('values'), symbols: z.record(z.string(), Value).catch({}), repeatsEvery: z.number().optional().catch(undefined) }),
]);

const Exception = z.object({
  fields: z.partialRecord(z.enum([...DATE_FIELDS, 'other']), z.string()).catch({}),
  from: Text,
  to: Text,
  replaces: z.boolean().optional().catch(undefined),
});

const Draft = z.object({
  fields: z.array(z.unknown()).catch([]),
  symbolSets: z.record(z.string(), z.unknown()).catch({}),
  yearStart: z.string().optional().catch(undefined),
  usedFrom: Text,
  usedTo: z.string().nullable().catch(''),
  exceptions: z.array(Exception.catch({ fields: {}, from: '', to: '' })).optional().catch(undefined),
});

/**
 * A draft of a definition as the bench can show it, whatever was kept of it: what is missing is blank, what is no field or set at all is
 * left out. What it says may still make no sense; `faultsOfDraft` tells.
 */
export function readDraft(value: unknown): CipherDefinition {
  const parsed = Draft.safeParse(value);
  if (!parsed.success) return BLANK;
  const { fields, symbolSets, yearStart, usedFrom, usedTo, exceptions } = parsed.data;
  return {
    fields: fields.flatMap((field) => known(Field, field)),
    symbolSets: Object.fromEntries(Object.entries(symbolSets).flatMap(([name, set]) => known(Set, set).map((one) => [name, one] as const))),
    ...(yearStart === undefined ? {} : { yearStart }),
    usedFrom,
    usedTo,
    ...(exceptions === undefined || exceptions.length === 0 ? {} : { exceptions }),
  };
}

function known<Value>(schema: z.ZodType<Value>, value: unknown): Value[] {
  const parsed = schema.safeParse(value);
  return parsed.success ? [parsed.data] : [];
}
