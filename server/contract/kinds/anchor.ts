import { z } from 'zod';
import { DATE_MEANINGS, DATE_PRECISIONS } from '#domain/vocabulary.ts';
import { Id } from '../common.ts';
import { DATE_MEANING_CHOICES, DATE_PRECISION_CHOICES, Days, hasPrecision, kindForm, OptionalProse, SerialNumber } from './kind.ts';

export const anchor = kindForm({
  kind: 'anchor',
  name: 'Dated machine',
  names: 'Dated machines',
  about: 'One serial number whose day is known from a document; it narrows the ranges around it.',
  page: 'model',
  payload: z
    .strictObject({
      seriesId: Id,
      number: SerialNumber,
      built: Days,
      precision: z.enum(DATE_PRECISIONS),
      meaning: z.enum(DATE_MEANINGS),
      note: OptionalProse,
    })
    .refine(({ built, precision }) => hasPrecision(built, precision), {
      error: 'Told to the month or year, the days are the first and last of whole ones',
      path: ['precision'],
    }),
  fields: [
    { key: 'seriesId', label: 'Series', control: 'fact', of: 'series' },
    { key: 'number', label: 'Serial number', hint: 'Without the prefix', control: 'whole' },
    { key: 'built', label: 'Days', hint: 'First and last it can have been', control: 'days' },
    { key: 'precision', label: 'The source tells them', control: 'choice', choices: DATE_PRECISION_CHOICES },
    { key: 'meaning', label: 'It is the day the machine was', control: 'choice', choices: DATE_MEANING_CHOICES },
    { key: 'note', label: 'Note', hint: 'How the date is known', control: 'prose', optional: true },
  ],
});
