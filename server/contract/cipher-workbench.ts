import { z } from 'zod';
import { CipherDefinitionSchema } from './cipher.ts';
import { Id } from './common.ts';
import { endpoint } from './endpoint.ts';
import { EvidenceItem } from './evidence.ts';

/** How a draft of a cipher reads the marks on record, while it is typed. */

const DRAFT_READINGS = ['decoded', 'ambiguous', 'impossible'] as const;

const Readings = z.object({ decoded: z.number().int(), ambiguous: z.number().int(), impossible: z.number().int() });

export const tryCipher = endpoint({
  method: 'POST',
  path: '/ciphers/try',
  summary: 'How a draft cipher reads every date mark of a maker on record, and what changes against the version in force',
  body: z.strictObject({
    makerId: Id,
    foundryId: Id.nullable(),
    definition: CipherDefinitionSchema,
    /** The cipher it would change. */
    subjectId: Id.nullable(),
  }),
  answer: z.object({
    marks: z.number().int(),
    draft: Readings,
    /** Null for a new cipher. */
    inForce: Readings.nullable(),
    /** Marks that the two read otherwise. */
    changed: z.number().int(),
    rows: z.array(
      z.object({
        item: EvidenceItem,
        draft: z.object({ reading: z.enum(DRAFT_READINGS), dates: z.array(z.string()) }),
        inForce: z.object({ reading: z.enum(DRAFT_READINGS), dates: z.array(z.string()) }).nullable(),
      }),
    ),
    unlisted: z.number().int(),
  }),
});
