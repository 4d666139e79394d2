import { z } from 'zod';
import { Id } from '../common.ts';
import { kindForm, Label, OptionalLabel, OptionalProse } from './kind.ts';

export const works = kindForm({
  kind: 'works',
  name: 'Works',
  names: 'Works',
  about: 'One place where a maker built or poured.',
  page: 'maker',
  payload: z.strictObject({ makerId: Id, name: Label, place: OptionalLabel, note: OptionalProse }),
  fields: [
    { key: 'makerId', label: 'Maker', control: 'fact', of: 'maker' },
    { key: 'name', label: 'Name', control: 'line' },
    { key: 'place', label: 'Place', control: 'line', optional: true },
    { key: 'note', label: 'Note', control: 'prose', optional: true },
  ],
});
