import { z } from 'zod';
import { MEASURE_UNITS, WEAR_DIRECTIONS } from '#domain/vocabulary.ts';
import { Id } from '../common.ts';
import { kindForm, Label, OptionalProse } from './kind.ts';

const Size = z.number().min(-100_000).max(100_000).multipleOf(0.0001);

const AsBuilt = z
  .strictObject({ from: Size, to: Size.nullable() })
  .refine(({ from, to }) => to === null || from <= to, { error: 'The largest is less than the smallest', path: ['to'] });

export const wearLimit = kindForm({
  kind: 'wear-limit',
  name: 'Wear limit',
  names: 'Wear limits',
  about: 'How far a measure of a part may wear before the part is done.',
  page: 'partType',
  caution: {
    title: 'A limit is not a sign of soundness',
    text: 'Cracked, pressed or lifted parts can fail inside their limits. Have boilers, pressure parts and lifting gear examined by whoever your local code licenses for it.',
  },
  payload: z
    .strictObject({
      partTypeId: Id,
      modelId: Id.nullable(),
      measure: Label,
      unit: z.enum(MEASURE_UNITS),
      asBuilt: AsBuilt.nullable(),
      direction: z.enum(WEAR_DIRECTIONS),
      limit: Size,
      method: OptionalProse,
      note: OptionalProse,
    })
    .refine(
      ({ asBuilt, direction, limit }) =>
        asBuilt === null || (direction === 'most' ? limit >= (asBuilt.to ?? asBuilt.from) : limit <= asBuilt.from),
      { error: 'A new part would be past this limit already', path: ['limit'] },
    ),
  fields: [
    { key: 'partTypeId', label: 'Part type', control: 'fact', of: 'part-type' },
    { key: 'modelId', label: 'Model', hint: 'Leave blank where it holds for every model', control: 'fact', of: 'model', optional: true },
    { key: 'measure', label: 'Measure', hint: 'What is measured, as “bore, front end”', control: 'line' },
    {
      key: 'unit',
      label: 'Unit',
      control: 'choice',
      choices: [
        { value: 'mm', label: 'Millimetres' },
        { value: 'in', label: 'Inches' },
        { value: 'degree', label: 'Degrees' },
        { value: 'gram', label: 'Grams' },
        { value: 'newton-metre', label: 'Newton metres' },
      ],
    },
    { key: 'asBuilt', label: 'When new', hint: 'Smallest and largest', control: 'counts', unit: '', optional: true },
    {
      key: 'direction',
      label: 'It wears',
      control: 'choice',
      choices: [
        { value: 'most', label: 'Larger, at most to the limit' },
        { value: 'least', label: 'Smaller, at least to the limit' },
      ],
    },
    { key: 'limit', label: 'Limit', control: 'number' },
    { key: 'method', label: 'How it is measured', control: 'prose', optional: true },
    { key: 'note', label: 'Note', control: 'prose', optional: true },
  ],
});
