import { z } from 'zod';
import { RANGE_STANDINGS } from '#domain/serials/build-window.ts';
import { DATE_MEANINGS, DATE_PRECISIONS } from '#domain/vocabulary.ts';
import { Id } from '../common.ts';
import { DATE_MEANING_CHOICES, DATE_PRECISION_CHOICES, Days, hasPrecision, kindForm, Numbers, OptionalProse } from './kind.ts';

export const serialRange = kindForm({
  kind: 'serial-range',
  name: 'Serial range',
  names: 'Serial ranges',
  about: 'When the numbers of one stretch of a series were built, by one account.',
  page: 'serialRange',
  payload: z
    .strictObject({
      seriesId: Id,
      accountId: Id.nullable(),
      numbers: Numbers,
      built: Days,
      precision: z.enum(DATE_PRECISIONS),
      meaning: z.enum(DATE_MEANINGS),
      standing: z.enum(RANGE_STANDINGS),
      inOrder: z.boolean(),
      note: OptionalProse,
    })
    .refine(({ built, precision }) => hasPrecision(built, precision), {
      error: 'Told to the month or year, the days are the first and last of whole ones',
      path: ['precision'],
    }),
  fields: [
    { key: 'seriesId', label: 'Series', control: 'fact', of: 'series' },
    { key: 'accountId', label: 'Account', hint: 'Whose reckoning; leave blank for the account your first source gives', control: 'account', optional: true },
    { key: 'numbers', label: 'Numbers', hint: 'First and last; leave the last blank where nobody knows it', control: 'numbers', open: 'last' },
    { key: 'built', label: 'Days', hint: 'First and last', control: 'days' },
    { key: 'precision', label: 'The source tells them', control: 'choice', choices: DATE_PRECISION_CHOICES },
    { key: 'meaning', label: 'They are the days machines were', control: 'choice', choices: DATE_MEANING_CHOICES },
    {
      key: 'standing',
      label: 'Standing',
      control: 'choice',
      choices: [
        { value: 'solid', label: 'Solid: the source says so' },
        { value: 'interpolated', label: 'Interpolated between what is known' },
        { value: 'conjectural', label: 'Conjectural' },
      ],
    },
    { key: 'inOrder', label: 'The source says the numbers were issued in order', control: 'yes-no' },
    { key: 'note', label: 'Note', control: 'prose', optional: true },
  ],
});
