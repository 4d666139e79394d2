import { z } from 'zod';
import { Id } from '../common.ts';
import { LIMITS } from '../limits.ts';
import { kindForm, Label, OptionalProse } from './kind.ts';

const Lead = z
  .strictObject({ from: z.int().min(0).max(LIMITS.lead), to: z.int().min(0).max(LIMITS.lead).nullable() })
  .refine(({ from, to }) => to === null || from <= to, { error: 'The most is less than the least', path: ['to'] });

export const position = kindForm({
  kind: 'position',
  name: 'Position',
  names: 'Positions',
  about: 'A place on a model that a part goes; one row of its checklist.',
  page: 'model',
  payload: z.strictObject({
    modelId: Id,
    partTypeId: Id,
    name: Label,
    ordinal: z.int().min(1).max(500),
    weight: z.number().positive().max(100).multipleOf(0.001),
    lead: Lead.nullable(),
    note: OptionalProse,
  }),
  fields: [
    { key: 'modelId', label: 'Model', control: 'fact', of: 'model' },
    { key: 'partTypeId', label: 'Part type', control: 'fact', of: 'part-type' },
    { key: 'name', label: 'Name', control: 'line' },
    { key: 'ordinal', label: 'Place in the checklist', hint: '1 is the first row', control: 'number' },
    { key: 'weight', label: 'Weight', hint: 'How much it counts in the score; 1 unless there is a reason', control: 'number' },
    {
      key: 'lead',
      label: 'Accepted lead',
      hint: 'Days from casting to assembly, least and most; it needs a source of its own, cited for the field “lead”',
      control: 'counts',
      unit: 'days',
      optional: true,
    },
    { key: 'note', label: 'Note', control: 'prose', optional: true },
  ],
});
