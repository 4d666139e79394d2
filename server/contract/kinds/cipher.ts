import { z } from 'zod';
import { MACHINE_KINDS } from '#domain/vocabulary.ts';
import { CipherDefinitionSchema } from '../cipher.ts';
import { Id } from '../common.ts';
import { kindForm, Label, OptionalProse } from './kind.ts';
import { MACHINE_KIND_CHOICES } from './machine-kinds.ts';

export const cipher = kindForm({
  kind: 'cipher',
  name: 'Cipher',
  names: 'Ciphers',
  about: 'How a maker wrote dates: fields, letters, years in use.',
  page: 'cipher',
  payload: z.strictObject({
    makerId: Id,
    foundryId: Id.nullable(),
    title: Label,
    machineKind: z.enum(MACHINE_KINDS).nullable(),
    definition: CipherDefinitionSchema,
    note: OptionalProse,
  }),
  fields: [
    { key: 'makerId', label: 'Maker', control: 'fact', of: 'maker' },
    { key: 'foundryId', label: 'Foundry', hint: 'Where only castings of one foundry carry it', control: 'fact', of: 'maker', optional: true },
    { key: 'title', label: 'Title', hint: 'What to call it, as “ten-letter date”', control: 'line' },
    { key: 'machineKind', label: 'Kind of machine', hint: 'Leave blank for all', control: 'choice', choices: MACHINE_KIND_CHOICES, optional: true },
    { key: 'definition', label: 'Layout', control: 'cipher' },
    { key: 'note', label: 'Note', control: 'prose', optional: true },
  ],
});
