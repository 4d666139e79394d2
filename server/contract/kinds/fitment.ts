import { z } from 'zod';
import { FITMENT_VERDICTS } from '#domain/vocabulary.ts';
import { Id } from '../common.ts';
import { kindForm, OpenNumbers, OptionalProse } from './kind.ts';

export const fitment = kindForm({
  kind: 'fitment',
  name: 'Fitment',
  names: 'Fitments',
  about: 'Whether a casting belongs in a position, on which serials.',
  page: 'casting',
  payload: z
    .strictObject({
      positionId: Id,
      castingId: Id,
      seriesId: Id.nullable(),
      numbers: OpenNumbers,
      verdict: z.enum(FITMENT_VERDICTS),
      note: OptionalProse,
    })
    .refine(({ seriesId, numbers }) => seriesId !== null || (numbers.from === null && numbers.to === null), {
      error: 'Numbers mean something only within a series: name it',
      path: ['seriesId'],
    }),
  fields: [
    { key: 'positionId', label: 'Position', control: 'fact', of: 'position' },
    { key: 'castingId', label: 'Casting', hint: 'One of the position’s part type', control: 'fact', of: 'casting', within: 'positionId' },
    { key: 'seriesId', label: 'Series', hint: 'Leave blank for every series of the model', control: 'fact', of: 'series', within: 'positionId', optional: true },
    { key: 'numbers', label: 'Serial numbers', hint: 'First and last; blank for all', control: 'numbers', open: 'both' },
    {
      key: 'verdict',
      label: 'On these machines it is',
      control: 'choice',
      choices: [
        { value: 'as-built', label: 'As built' },
        { value: 'later-fits', label: 'Later type, fits' },
        { value: 'earlier-fits', label: 'Earlier type, fits' },
        { value: 'does-not-belong', label: 'Does not belong' },
      ],
    },
    { key: 'note', label: 'Note', hint: 'Why, in a sentence', control: 'prose', optional: true },
  ],
});
