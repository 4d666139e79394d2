import { z } from 'zod';
import { MACHINE_KINDS } from '#domain/vocabulary.ts';
import { Id } from '../common.ts';
import { kindForm, Label, OpenDays, OptionalProse } from './kind.ts';
import { MACHINE_KIND_CHOICES } from './machine-kinds.ts';

export const model = kindForm({
  kind: 'model',
  name: 'Model',
  names: 'Models',
  about: 'A model of machine; its positions make up its checklist.',
  page: 'model',
  payload: z.strictObject({ makerId: Id, name: Label, machineKind: z.enum(MACHINE_KINDS), made: OpenDays.nullable(), note: OptionalProse }),
  fields: [
    { key: 'makerId', label: 'Maker', control: 'fact', of: 'maker' },
    { key: 'name', label: 'Name', control: 'line' },
    { key: 'machineKind', label: 'Kind of machine', control: 'choice', choices: MACHINE_KIND_CHOICES },
    { key: 'made', label: 'Built', hint: 'First and last day; leave out what is not known', control: 'days', open: true, optional: true },
    { key: 'note', label: 'Note', control: 'prose', optional: true },
  ],
});
