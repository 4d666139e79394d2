import { z } from 'zod';
import { kindForm, Label, OptionalProse } from './kind.ts';

export const partType = kindForm({
  kind: 'part-type',
  name: 'Part type',
  names: 'Part types',
  about: 'What a part is, whoever made it: gear case, flywheel.',
  page: 'partType',
  payload: z.strictObject({ name: Label, note: OptionalProse, caution: OptionalProse }),
  fields: [
    { key: 'name', label: 'Name', control: 'line' },
    { key: 'note', label: 'Note', hint: 'Where to look for its marks', control: 'prose', optional: true },
    {
      key: 'caution',
      label: 'Caution',
      hint: 'What can hurt whoever works on it: weight, pressure, asbestos, lead paint, cracked iron',
      control: 'prose',
      optional: true,
    },
  ],
});
