import { z } from 'zod';
import { Id } from '../common.ts';
import { CastNumber, FACT_LIMITS, kindForm, Label, OpenDays, OptionalLabel, OptionalProse, Prose } from './kind.ts';

export const casting = kindForm({
  kind: 'casting',
  name: 'Casting',
  names: 'Castings',
  about: 'A casting number: what it is on, when it was poured, and how to tell it.',
  page: 'casting',
  payload: z.strictObject({
    makerId: Id,
    pouredById: Id.nullable(),
    partTypeId: Id,
    number: CastNumber,
    pattern: OptionalLabel,
    made: OpenDays.nullable(),
    note: OptionalProse,
    tells: z.array(z.strictObject({ place: Label, tell: Prose })).max(FACT_LIMITS.rows),
    partNumbers: z.array(z.strictObject({ number: CastNumber, note: OptionalProse })).max(FACT_LIMITS.rows),
  }),
  fields: [
    { key: 'makerId', label: 'Maker', hint: 'Whose number it is', control: 'fact', of: 'maker' },
    { key: 'pouredById', label: 'Poured by', hint: 'The foundry, where it was not the maker’s own or is known to have been', control: 'fact', of: 'maker', optional: true },
    { key: 'partTypeId', label: 'Part type', control: 'fact', of: 'part-type' },
    { key: 'number', label: 'Casting number', hint: 'As it stands on the iron', control: 'line', mono: true },
    { key: 'pattern', label: 'Pattern', hint: 'What tells castings of one number apart, as “second pattern”', control: 'line', optional: true },
    { key: 'made', label: 'Poured', hint: 'First and last day; leave out what is not known', control: 'days', open: true, optional: true },
    {
      key: 'tells',
      label: 'Tells',
      hint: 'What to check by eye',
      control: 'rows',
      row: 'tell',
      most: FACT_LIMITS.rows,
      optional: true,
      columns: [
        { key: 'place', label: 'Where', control: 'line' },
        { key: 'tell', label: 'What is seen there', control: 'prose' },
      ],
    },
    {
      key: 'partNumbers',
      label: 'Part numbers',
      hint: 'Under which parts books sold it',
      control: 'rows',
      row: 'part number',
      most: FACT_LIMITS.rows,
      optional: true,
      columns: [
        { key: 'number', label: 'Number', control: 'line', mono: true },
        { key: 'note', label: 'Note', control: 'line', optional: true },
      ],
    },
    { key: 'note', label: 'Note', control: 'prose', optional: true },
  ],
});
