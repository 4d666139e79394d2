import type { Knex } from 'knex';
import { z } from 'zod';
import { DECODE_STATUSES } from '#domain/ciphers/decoding.ts';
import { FIT_VERDICTS } from '#domain/fit/fit.ts';
import { FITMENT_VERDICTS, MARK_TECHNIQUES } from '#domain/vocabulary.ts';
import type { Rework } from '#db/models/rework.ts';

/** What is worked out again of some parts, as it stands on record. */
export type PartsAtHand = {
  /** The last part of the stretch they were looked for in, which may not be one of them; `null`: there are no more parts. */
  readonly last: string | null;
  readonly parts: readonly PartAtHand[];
  readonly numbers: readonly z.infer<typeof NumberMark>[];
  readonly dates: readonly DateMark[];
  readonly fittings: readonly Fitting[];
};

const PartAtHand = z.object({
  id: z.string(),
  makerId: z.string().nullable(),
  partTypeId: z.string().nullable(),
  castingId: z.string().nullable(),
});
export type PartAtHand = z.infer<typeof PartAtHand>;

const NumberMark = z.object({ partId: z.string(), reading: z.string() });

const Candidate = z.object({ from: z.string(), to: z.string(), share: z.number() });

const DateMark = z.object({
  id: z.string(),
  partId: z.string(),
  technique: z.enum(MARK_TECHNIQUES),
  reading: z.string().nullable(),
  /** Null, and the four after it: never worked out before. */
  status: z.enum(DECODE_STATUSES).nullable(),
  cipherId: z.string().nullable(),
  cipherVersion: z.number().nullable(),
  total: z.number().nullable(),
  candidates: z.array(Candidate).nullable(),
});
export type DateMark = z.infer<typeof DateMark>;

const Fitting = z.object({
  id: z.string(),
  partId: z.string(),
  machineId: z.string(),
  positionId: z.string(),
  modelId: z.string(),
  serialAsStamped: z.string(),
  lead: z.object({ from: z.number().nullable(), to: z.number().nullable() }).nullable(),
  /** Null: never worked out before. */
  workedOut: z.string().nullable(),
  verdict: z.enum(FIT_VERDICTS).nullable(),
  late: z.number().nullable(),
  inLead: z.number().nullable(),
  early: z.number().nullable(),
  markId: z.string().nullable(),
  built: z.object({ from: z.string(), to: z.string() }).nullable(),
  typeVerdict: z.enum(FITMENT_VERDICTS).nullable(),
});
export type Fitting = z.infer<typeof Fitting>;

/** Parts and what is on them, without where they were looked for. */
export type Stretch = Omit<PartsAtHand, 'last'>;

const PART_COLUMNS = ['parts.id', 'parts.makerId', 'parts.partTypeId', 'parts.castingId'];

type Scope = Pick<Rework, 'makers' | 'models'>;

/**
 * Parts that rest on a fact: of its makers or foundries, of no maker that is known, for a new number may name it, and those now on
 * machines of its models.
 */
function partsResting({ makers, models }: Scope, knex: Knex): Knex.QueryBuilder {
  return knex('parts')
    .join('part_origins', 'part_origins.partId', 'parts.id')
    .where((any) => {
      if (makers.length > 0) {
        void any.whereIn('part_origins.makerId', makers).orWhereIn('part_origins.foundryId', makers).orWhereNull('part_origins.makerId');
      }
      if (models.length > 0) {
        const fittedOnThem = knex('part_fittings').select('partId').whereIn('modelId', models).whereRaw('upper_inf(fitted)');
        void any.orWhereIn('parts.id', fittedOnThem);
      }
    });
}

/** How many parts, and date marks on them, rest on a fact. */
export async function countResting(scope: Scope, knex: Knex): Promise<number> {
  const Count = z.tuple([z.object({ count: z.string() })]);
  const resting = partsResting(scope, knex).select('parts.id');
  const [parts] = Count.parse(await knex.count({ count: '*' }).from(resting.clone().as('resting')));
  const [dates] = Count.parse(await knex('marks').where({ kind: 'date-code' }).whereIn('partId', resting.clone()).count({ count: '*' }));
  return Number(parts.count) + Number(dates.count);
}

/**
 * Of the next so many parts by id, those that rest on a fact, with their numbers, dates and where they are fitted. A stretch of all parts
 * costs the same however few of them rest on it.
 */
export async function partsAfter({ reached, ...scope }: Scope & Pick<Rework, 'reached'>, stretch: number, knex: Knex): Promise<PartsAtHand> {
  const next = knex('parts').select('id').orderBy('id').limit(stretch);
  if (reached !== null) void next.where('id', '>', reached);
  const last = z.array(z.object({ id: z.string() })).parse(await next).at(-1)?.id ?? null;
  if (last === null) return { last, parts: [], numbers: [], dates: [], fittings: [] };
  const query = partsResting(scope, knex).where('parts.id', '<=', last).orderBy('parts.id').select(PART_COLUMNS);
  if (reached !== null) void query.where('parts.id', '>', reached);
  return { last, ...(await withWhatIsOnThem(z.array(PartAtHand).parse(await query), knex)) };
}

/** One part with its numbers, dates and where it is fitted; nothing where it is not on record. */
export async function partAtHand(id: string, knex: Knex): Promise<Stretch> {
  return withWhatIsOnThem(z.array(PartAtHand).parse(await knex('parts').where({ id }).select(PART_COLUMNS)), knex);
}

async function withWhatIsOnThem(parts: readonly PartAtHand[], knex: Knex): Promise<Stretch> {
  const ids = parts.map(({ id }) => id);
  const numbers = await knex('marks').where({ kind: 'casting-number' }).whereNotNull('reading').whereIn('partId', ids).orderBy('id').select('partId', 'reading');
  const dates = await knex('marks')
    .leftJoin('mark_decodings', 'mark_decodings.markId', 'marks.id')
    .where('marks.kind', 'date-code')
    .whereIn('marks.partId', ids)
    .orderBy('marks.id')
    .select('marks.id', 'marks.partId', 'marks.technique', 'marks.reading', 'status', 'cipherId', 'cipherVersion', 'total', 'candidates');
  const fittings = await knex('part_fittings')
    .join('machines', 'machines.id', 'part_fittings.machineId')
    .join('positions', 'positions.id', 'part_fittings.positionId')
    .leftJoin('part_fits', 'part_fits.fittingId', 'part_fittings.id')
    .whereIn('part_fittings.partId', ids)
    .whereRaw('upper_inf(part_fittings.fitted)')
    .select(
      'part_fittings.id', 'part_fittings.partId', 'part_fittings.machineId', 'part_fittings.positionId', 'part_fittings.modelId',
      'machines.serialAsStamped', 'positions.lead', { workedOut: 'part_fits.fittingId' },
      'verdict', 'late', 'inLead', 'early', 'markId', 'built', 'typeVerdict',
    );
  return { parts, numbers: z.array(NumberMark).parse(numbers), dates: z.array(DateMark).parse(dates), fittings: z.array(Fitting).parse(fittings) };
}
