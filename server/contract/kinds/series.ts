import { z } from 'zod';
import { Id } from '../common.ts';
import { kindForm, OptionalLabel, OptionalProse } from './kind.ts';

export const series = kindForm({
  kind: 'series',
  name: 'Series',
  names: 'Series',
  about: 'One run of serial numbers of a model.',
  page: 'model',
  payload: z.strictObject({
    modelId: Id,
    prefix: z.string().trim().toUpperCase().regex(/^[A-Z0-9]{0,8}$/, 'At most 8 capitals and digits'),
    worksId: Id.nullable(),
    label: OptionalLabel,
    note: OptionalProse,
  }),
  fields: [
    { key: 'modelId', label: 'Model', control: 'fact', of: 'model' },
    { key: 'prefix', label: 'Prefix', hint: 'Before the number; blank for none', control: 'line', mono: true, optional: true, blank: '' },
    { key: 'worksId', label: 'Works', hint: 'Where that tells one run from another', control: 'fact', of: 'works', within: 'modelId', optional: true },
    { key: 'label', label: 'Run', hint: 'What tells runs of one prefix apart, as “after the restart”', control: 'line', optional: true },
    { key: 'note', label: 'Note', hint: 'What to beware of when reading the number', control: 'prose', optional: true },
  ],
});
