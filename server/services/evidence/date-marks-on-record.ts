import type { Knex } from 'knex';
import { z } from 'zod';
import type { EvidenceSubject } from '#contract/evidence.ts';
import type { DaySpan } from '#domain/dates/day.ts';
import { dayOnRecord } from '#server/services/day-on-record.ts';
import { inLots } from '#server/services/in-lots.ts';
import { castingTitle } from './casting-title.ts';

/** A date mark that somebody read, with what is known of the part it stands on. */
const Row = z.object({
  id: z.string(),
  reading: z.string(),
  isPublic: z.boolean(),
  number: z.string().nullable(),
  pattern: z.string().nullable(),
  made: z.object({ from: z.string().nullable(), to: z.string().nullable() }).nullable(),
  partType: z.string().nullable(),
  modelId: z.string().nullable(),
  serialAsStamped: z.string().nullable(),
  isMachinePublic: z.boolean().nullable(),
});
export type DateMarkOnRecord = z.infer<typeof Row>;
const Rows = z.array(Row);

/** Date marks that were read, by id, some thousands at a time however many there are. `narrow` sees `parts` and `part_origins`. */
export async function* dateMarksOnRecord(narrow: (query: Knex.QueryBuilder) => void, knex: Knex): AsyncGenerator<readonly DateMarkOnRecord[]> {
  const query = datesRead(narrow, knex)
    .leftJoin('part_types', 'part_types.id', 'parts.partTypeId')
    .leftJoin('part_fittings', (on) => void on.on('part_fittings.partId', 'parts.id').andOn(knex.raw('upper_inf(part_fittings.fitted)')))
    .leftJoin('machines', 'machines.id', 'part_fittings.machineId')
    .orderBy('marks.id')
    .select(
      'marks.id', 'marks.reading', knex.raw(`parts.visibility = 'public' as ??`, ['isPublic']),
      'castings.number', 'castings.pattern', 'castings.made', { partType: 'part_types.name' },
      'machines.modelId', 'machines.serialAsStamped', knex.raw(`machines.visibility = 'public' as ??`, ['isMachinePublic']),
    );
  for await (const rows of inLots(query, knex)) yield Rows.parse(rows);
}

/** The query of date marks that were read, with the part, its casting where that is known, and its origin. */
export function datesRead(narrow: (query: Knex.QueryBuilder) => void, knex: Knex): Knex.QueryBuilder {
  return knex('marks')
    .join('parts', 'parts.id', 'marks.partId')
    .join('part_origins', 'part_origins.partId', 'parts.id')
    .leftJoin('castings', 'castings.id', 'parts.castingId')
    .where('marks.kind', 'date-code')
    .whereNotNull('marks.reading')
    .modify(narrow);
}

export function subjectOfMark({ id, number, pattern, partType }: Pick<DateMarkOnRecord, 'id' | 'number' | 'pattern' | 'partType'>): EvidenceSubject {
  const part = number === null ? (partType ?? 'part').toLowerCase() : castingTitle({ number, pattern });
  return { kind: 'mark', id, title: `Date mark on ${number === null ? 'a ' : ''}${part}` };
}

/** A casting's years as days; an end that is not known lies as far off as a day can. */
export function daysMade(made: { readonly from: string | null; readonly to: string | null }): DaySpan {
  return {
    from: made.from === null ? Number.MIN_SAFE_INTEGER : dayOnRecord(made.from),
    to: made.to === null ? Number.MAX_SAFE_INTEGER : dayOnRecord(made.to),
  };
}
