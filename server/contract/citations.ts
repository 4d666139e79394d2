import { z } from 'zod';
import { Id, IsoDay } from './common.ts';
import { CalendarYear, FACT_LIMITS, Label, OptionalLabel, OptionalProse, Prose } from './kinds/kind.ts';

/** A source the register does not have yet; each kind has its own fields. Whose sighting or knowledge it is, is whoever contributes. */
export const NewSource = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('book'), title: Label, author: OptionalLabel, publisher: OptionalLabel, year: CalendarYear.nullable(), note: OptionalProse }),
  z.strictObject({ kind: z.literal('drawing'), title: Label, drawingNumber: Label, sheet: OptionalLabel, year: CalendarYear.nullable(), note: OptionalProse }),
  z.strictObject({ kind: z.literal('plate'), title: Label, subject: Label, year: CalendarYear.nullable(), note: OptionalProse }),
  z.strictObject({ kind: z.literal('photo'), title: Label, subject: Label, author: OptionalLabel, dated: IsoDay.nullable(), note: OptionalProse }),
  z.strictObject({ kind: z.literal('sighting'), title: Label, subject: Label, dated: IsoDay, note: OptionalProse }),
  z.strictObject({ kind: z.literal('correspondence'), title: Label, author: OptionalLabel, addressee: OptionalLabel, dated: IsoDay.nullable(), note: OptionalProse }),
  z.strictObject({ kind: z.literal('own-knowledge'), title: Label, note: Prose }),
]);
export type NewSource = z.output<typeof NewSource>;

/** Which part of the fact a source stands behind: a field, or one row of a list counted from 1, as `tells.2`; null for all of it. */
const CitedField = z
  .string()
  .max(60)
  .regex(/^[a-z][A-Za-z]*(?:\.[1-9]\d*)?$/)
  .nullable();

/** One source behind a contribution: one the register has, by id, or a new one. */
export const Citation = z
  .strictObject({
    sourceId: Id.nullable(),
    newSource: NewSource.nullable(),
    field: CitedField,
    /** Where in it: a page, a sheet. */
    locator: OptionalLabel,
    note: OptionalProse,
  })
  .refine(({ sourceId, newSource }) => (sourceId === null) !== (newSource === null), { error: 'Choose a source or describe a new one', path: ['sourceId'] })
  .refine(({ newSource, locator }) => newSource?.kind !== 'book' || locator !== null, { error: 'Name the page', path: ['locator'] });
export type Citation = z.output<typeof Citation>;

export const Citations = z.array(Citation).min(1, 'At least one source').max(FACT_LIMITS.rows);
