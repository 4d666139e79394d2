import type { Knex } from 'knex';
import { parseReading } from '#domain/marks/reading.ts';
import { Casting } from '#db/models/casting.ts';
import { listPage } from './list-page.ts';
import type { ListRequest, Order, Page } from './list-page.ts';
import { numberPattern } from './number-pattern.ts';
import { ProblemError } from './problem-error.ts';
import { matchText } from './search.ts';

const NUMBER = [{ column: 'castings.numberKey', as: 'text' }] as const;
const MADE = [{ column: 'castings.made', as: 'first-day' }, ...NUMBER] as const;
const ORDERS = {
  number: { keys: NUMBER, direction: 'asc' },
  '-number': { keys: NUMBER, direction: 'desc' },
  made: { keys: MADE, direction: 'asc' },
  '-made': { keys: MADE, direction: 'desc' },
} as const satisfies Record<string, Order>;

export type CastingListing = ListRequest<keyof typeof ORDERS> & {
  readonly q?: string | undefined;
  /** In the mark notation. */
  readonly number?: string | undefined;
  readonly maker?: string | undefined;
  readonly partType?: string | undefined;
  readonly model?: string | undefined;
};

export async function listCastings(request: CastingListing, knex: Knex): Promise<Page<Casting>> {
  const pattern = request.number === undefined ? undefined : patternOf(request.number);
  return listPage(
    {
      table: 'castings',
      orders: ORDERS,
      request,
      filter: (query) => {
        const { q, maker, partType, model } = request;
        void query.join('makers', 'makers.id', 'castings.makerId').join('part_types', 'part_types.id', 'castings.partTypeId');
        if (pattern !== undefined) void query.where('castings.numberKey', '~', pattern);
        if (maker) void query.where('makers.slug', maker);
        if (partType) void query.where('part_types.slug', partType);
        if (model) void query.whereIn('castings.id', castingsOfModel(model, knex));
        if (q) matchText(query, ['part_types.name', 'makers.name', 'castings.pattern', 'castings.number', 'castings.numberKey'], q);
      },
      load: (ids, trx) => Casting.query(trx).findByIds([...ids]).withGraphFetched('[maker, partType]'),
    },
    knex,
  );
}

/** Castings that are at home on a model, or at least go on it. */
function castingsOfModel(slug: string, knex: Knex): Knex.QueryBuilder {
  return knex('fitments')
    .join('models', 'models.id', 'fitments.modelId')
    .where('models.slug', slug)
    .whereNot('fitments.verdict', 'does-not-belong')
    .select('fitments.castingId');
}

function patternOf(number: string): string {
  const reading = parseReading(number);
  if (reading.ok) return numberPattern(reading.value);
  throw new ProblemError('invalid', 'See which, and why, under errors.', {
    errors: [{ path: ['number'], message: reading.fault.message }],
  });
}
