import { z } from 'zod';
import { compileCipher } from '#domain/ciphers/compile.ts';
import { CIPHER_LIMITS, DATE_FIELDS, WEEK_RULES } from '#domain/ciphers/definition.ts';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { IsoDay } from './common.ts';

const Width = z.union([
  z.int().min(1).max(CIPHER_LIMITS.fieldWidth),
  z.tuple([z.int().min(1).max(CIPHER_LIMITS.fieldWidth), z.int().min(1).max(CIPHER_LIMITS.fieldWidth)]),
]);
const SetName = z.string().min(1).max(40);
const Symbols = z.string().min(1).max(CIPHER_LIMITS.fieldWidth);

const LiteralField = z.strictObject({ field: z.literal('literal'), text: z.string().min(1).max(CIPHER_LIMITS.literalLength) });
const OtherField = z.strictObject({
  field: z.literal('other'),
  symbols: SetName,
  width: Width,
  name: z.string().min(1).max(40).optional(),
});
const DatedField = z.strictObject({
  field: z.enum(DATE_FIELDS),
  symbols: SetName,
  width: Width,
  week: z.enum(WEEK_RULES).optional(),
});

const DigitsSet = z.strictObject({
  kind: z.literal('digits'),
  symbols: z.record(Symbols, z.string().max(4)),
  repeater: z.string().max(4).optional(),
});
const ValuesSet = z.strictObject({
  kind: z.literal('values'),
  symbols: z.record(Symbols, z.union([z.int(), z.array(z.int()).min(1).max(CIPHER_LIMITS.symbolsPerSet)])),
  repeatsEvery: z.int().min(1).max(1000).optional(),
});

const Exception = z.strictObject({
  fields: z.partialRecord(z.enum([...DATE_FIELDS, 'other']), z.string().min(1).max(CIPHER_LIMITS.fieldWidth)),
  from: IsoDay,
  to: IsoDay,
  replaces: z.boolean().optional(),
});

/** The definition's shape alone, with its limits; meaning is checked by `CipherDefinitionSchema`. */
const CipherShape = z.strictObject({
  fields: z.array(z.discriminatedUnion('field', [LiteralField, OtherField, DatedField])).min(1).max(CIPHER_LIMITS.fields),
  symbolSets: z.record(SetName, z.discriminatedUnion('kind', [DigitsSet, ValuesSet])).refine(
    (sets) => Object.keys(sets).length <= CIPHER_LIMITS.fields,
    `At most ${CIPHER_LIMITS.fields} symbol sets`,
  ),
  yearStart: z.string().regex(/^\d{2}-\d{2}$/, 'Month and day, as 05-29').optional(),
  usedFrom: IsoDay,
  usedTo: IsoDay.nullable(),
  exceptions: z.array(Exception).max(CIPHER_LIMITS.exceptions).optional(),
});

/** The one schema of a cipher definition for server, client and fixtures: its shape, then its meaning, each fault with its path. */
export const CipherDefinitionSchema: z.ZodType<CipherDefinition> = CipherShape.superRefine((definition, context) => {
  const compiled = compileCipher(definition);
  if (compiled.ok) return;
  for (const fault of compiled.fault) context.addIssue({ code: 'custom', path: [...fault.path], message: fault.message });
});
