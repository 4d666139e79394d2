import { z } from 'zod';
import { INTERCHANGES } from '#domain/vocabulary.ts';
import { Id } from '../common.ts';
import { kindForm, OptionalProse } from './kind.ts';

export const supersession = kindForm({
  kind: 'supersession',
  name: 'Supersession',
  names: 'Supersessions',
  about: 'Which casting took another’s place, and whether the old one still serves.',
  page: 'casting',
  payload: z
    .strictObject({ oldId: Id, newId: Id, interchange: z.enum(INTERCHANGES), note: OptionalProse })
    .refine(({ oldId, newId }) => oldId !== newId, { error: 'A casting does not follow itself', path: ['newId'] }),
  fields: [
    { key: 'oldId', label: 'Old casting', control: 'fact', of: 'casting' },
    { key: 'newId', label: 'New casting', hint: 'Of the same part type', control: 'fact', of: 'casting', within: 'oldId' },
    {
      key: 'interchange',
      label: 'Interchange',
      control: 'choice',
      choices: [
        { value: 'both-ways', label: 'Each fits in place of the other' },
        { value: 'new-for-old', label: 'Only the new in place of the old' },
      ],
    },
    { key: 'note', label: 'Note', control: 'prose', optional: true },
  ],
});
