import type { Knex } from 'knex';
import { z } from 'zod';
import type { EvidenceSubject } from '#contract/evidence.ts';
import { DECODE_STATUSES } from '#domain/ciphers/decoding.ts';
import type { DaySpan } from '#domain/dates/day.ts';
import { spanOnRecord } from '#server/services/day-on-record.ts';
import { inLots } from '#server/services/in-lots.ts';
import { castingTitle } from './casting-title.ts';
import { sayDates } from './say-dates.ts';

/** A part, where it is now, and the best of its date marks as it was worked out. */
const Row = z.object({
  id: z.string(),
  isPublic: z.boolean(),
  castingId: z.string().nullable(),
  number: z.string().nullable(),
  pattern: z.string().nullable(),
  partType: z.string().nullable(),
  modelId: z.string().nullable(),
  serialAsStamped: z.string().nullable(),
  isMachinePublic: z.boolean().nullable(),
  numberMarkId: z.string().nullable(),
  numberReading: z.string().nullable(),
  dateMarkId: z.string().nullable(),
  dateReading: z.string().nullable(),
  status: z.enum(DECODE_STATUSES).nullable(),
  total: z.number().nullable(),
  candidates: z.array(z.object({ from: z.string(), to: z.string(), share: z.number() })).nullable(),
});
export type PartOnRecord = z.infer<typeof Row>;
const Rows = z.array(Row);

export type PartDate = { readonly candidates: readonly (DaySpan & { readonly share: number })[]; readonly total: number };

/** Parts by id, some thousands at a time. `narrow` sees `parts`, `part_origins`, `castings`, and `part_fittings` and `machines` as they are now. */
export async function* partsOnRecord(narrow: (query: Knex.QueryBuilder) => void, knex: Knex): AsyncGenerator<readonly PartOnRecord[]> {
  const query = knex('parts')
    .join('part_origins', 'part_origins.partId', 'parts.id')
    .leftJoin('castings', 'castings.id', 'parts.castingId')
    .leftJoin('part_types', 'part_types.id', 'parts.partTypeId')
    .leftJoin('part_fittings', (on) => void on.on('part_fittings.partId', 'parts.id').andOn(knex.raw('upper_inf(part_fittings.fitted)')))
    .leftJoin('machines', 'machines.id', 'part_fittings.machineId')
    .joinRaw(
      `left join lateral (
         select id, reading from marks where part_id = parts.id and kind = 'casting-number' and reading is not null order by id limit 1
       ) as number_mark on true
       left join lateral (
         select id, reading, status, total, candidates from marks join mark_decodings on mark_id = id
          where part_id = parts.id and technique = 'cast' and status <> 'none' order by total, id limit 1
       ) as date_mark on true`,
    )
    .modify(narrow)
    .orderBy('parts.id')
    .select(
      'parts.id', knex.raw(`parts.visibility = 'public' as ??`, ['isPublic']), 'parts.castingId', 'castings.number', 'castings.pattern',
      { partType: 'part_types.name' }, 'machines.modelId', 'machines.serialAsStamped',
      knex.raw(`machines.visibility = 'public' as ??`, ['isMachinePublic']),
      { numberMarkId: 'number_mark.id', numberReading: 'number_mark.reading', dateMarkId: 'date_mark.id', dateReading: 'date_mark.reading' },
      'date_mark.status', 'date_mark.total', 'date_mark.candidates',
    );
  for await (const rows of inLots(query, knex)) yield Rows.parse(rows);
}

/** When a part was cast, as it was worked out; `null`: undated. */
export function dateOf({ candidates, total }: PartOnRecord): PartDate | null {
  if (candidates === null || total === null) return null;
  return { candidates: candidates.map(({ from, to, share }) => ({ ...spanOnRecord({ from, to }), share })), total };
}

export function sayDateOf(part: PartOnRecord): string {
  const date = dateOf(part);
  return date === null ? 'undated' : `cast ${sayDates(date.candidates, date.total)}`;
}

/** A part is linked by a mark on it: its number, else its date; one without either by nothing. */
export function subjectOfPart({ numberMarkId, dateMarkId, number, pattern, partType }: PartOnRecord): EvidenceSubject | null {
  const id = numberMarkId ?? dateMarkId;
  const name = number === null ? `a ${(partType ?? 'part').toLowerCase()}` : castingTitle({ number, pattern });
  return id === null ? null : { kind: 'mark', id, title: `${numberMarkId === null ? 'Date mark' : 'Number'} on ${name}` };
}
