import type { Knex } from 'knex';
import { z } from 'zod';
import type { EvidenceFigure } from '#contract/evidence.ts';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import type { Day } from '#domain/dates/day.ts';
import { dayOnRecord } from '#server/services/day-on-record.ts';
import { chanceAgreement } from './chance-agreement.ts';
import type { DatedCasting } from './chance-agreement.ts';
import { datesRead } from './date-marks-on-record.ts';

/** Marks the random keys are tried on; of more, as many are drawn by lot. */
const MARKS_TRIED = 300;

const Row = z.object({ reading: z.string(), made: z.object({ from: z.string().nullable(), to: z.string().nullable() }) });

/** How often the cipher’s dates agree with the years of the castings they stand on, and how much of that chance alone would give. */
export async function chanceFigures(
  definition: CipherDefinition,
  carries: (query: Knex.QueryBuilder) => void,
  asOf: Day,
  knex: Knex,
): Promise<EvidenceFigure[]> {
  const marks = await marksToTry(carries, knex);
  const chance = await chanceAgreement(definition, marks, asOf);
  if (chance === null) return [];
  const tried = `${chance.marks} date marks on castings whose years are on record${chance.marks === MARKS_TRIED ? ', drawn by lot' : ''}`;
  return [
    {
      code: 'agreement',
      name: 'Marks with a date within their casting’s years',
      value: chance.agreeing / chance.marks,
      unit: 'share',
      working: `${chance.agreeing} of ${tried}.`,
    },
    {
      code: 'usual-agreement',
      name: 'The same under a random key',
      value: chance.usual / chance.marks,
      unit: 'share',
      working: `On the average of ${chance.keys} random keys, ${chance.usual.toFixed(1)} of the same ${chance.marks} marks.`,
    },
    {
      code: 'chance',
      name: 'How often a random key of the same shape does as well',
      value: chance.share,
      unit: 'share',
      working:
        `The values of each symbol set were dealt out anew among its own symbols, ${chance.keys} times, layout and days in use unchanged. ` +
        `${chance.asGood} of these keys date at least as many of the marks within their castings’ years. ` +
        `The share is (${chance.asGood} + 1) / (${chance.keys} + 1). The lot and the keys are the same every time.`,
    },
  ];
}

/** The lot is drawn by a digest of each mark’s id, which has nothing to do with what stands on it. */
async function marksToTry(carries: (query: Knex.QueryBuilder) => void, knex: Knex): Promise<readonly DatedCasting[]> {
  const rows: unknown = await datesRead(carries, knex)
    .whereNotNull('castings.made')
    .orderByRaw('md5(marks.id::text)')
    .limit(MARKS_TRIED)
    .select('marks.reading', 'castings.made');
  return z.array(Row).parse(rows).map(({ reading, made }) => ({
    reading,
    made: {
      ...(made.from === null ? {} : { from: dayOnRecord(made.from) }),
      ...(made.to === null ? {} : { to: dayOnRecord(made.to) }),
    },
  }));
}
