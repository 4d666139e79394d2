import type { Knex } from 'knex';
import { z } from 'zod';
import { ProblemError } from './problem-error.ts';
import { inSearch } from './search.ts';

/**
 * What a list may be ordered by: a column as text or as an instant, or where a range of days or numbers begins. A range that is not
 * known comes last when days ascend; an instant that may be none, and then is before all others; a text that may be none or long, by its
 * beginning.
 */
export type SortKey = { readonly column: string; readonly as: 'text' | 'beginning' | 'instant' | 'instant-if-any' | 'first-day' | 'first-number' };
export type Order = { readonly keys: readonly SortKey[]; readonly direction: 'asc' | 'desc' };

export type ListRequest<Sort extends string> = {
  readonly sort: Sort;
  readonly limit: number;
  /** The cursor the page before ended with. */
  readonly after?: string | undefined;
};

export type Page<Item> = {
  readonly items: readonly Item[];
  readonly next: string | null;
  /** How many there are on all pages; told on the first. */
  readonly total?: number;
};

type Listing<Sort extends string, Row> = {
  readonly table: string;
  readonly orders: Readonly<Record<Sort, Order>>;
  readonly request: ListRequest<Sort>;
  /** Narrows `select … from table`; may join. */
  readonly filter: (query: Knex.QueryBuilder) => void;
  /** Loads whole rows, in any order. */
  readonly load: (ids: readonly string[], trx: Knex.Transaction) => PromiseLike<readonly Row[]>;
};

const EXPRESSIONS = {
  text: '??::text',
  beginning: `left(coalesce(??, ''), 80)`,
  instant: '??',
  'instant-if-any': 'coalesce(??, to_timestamp(0))',
  'first-day': `coalesce(lower(??), 'infinity'::date)`,
  'first-number': 'lower(??)',
} as const satisfies Record<SortKey['as'], string>;

const VALUES = {
  text: '?::text',
  beginning: '?::text',
  instant: '?::timestamptz',
  'instant-if-any': '?::timestamptz',
  'first-day': '?::date',
  'first-number': '?::bigint',
} as const satisfies Record<SortKey['as'], string>;

const TEXT = z.string().max(200).refine((text) => !text.includes('\0'));
// As PostgreSQL writes it in UTC, to the microsecond: rows of one millisecond keep their order.
const INSTANT = z.string().regex(/^\d{4}-\d\d-\d\d \d\d:\d\d:\d\d(?:\.\d{1,6})?\+00$/);

const CURSOR_VALUES = {
  text: TEXT,
  beginning: TEXT,
  instant: INSTANT,
  'instant-if-any': INSTANT,
  'first-day': z.union([z.iso.date(), z.literal('infinity')]),
  'first-number': z.string().regex(/^\d{1,18}$/),
} as const satisfies Record<SortKey['as'], z.ZodType<string>>;

/**
 * One page of a list by keyset: the rows after the cursor's in the asked order, ties broken by id, so that rows entered or taken away
 * meanwhile neither repeat nor hide another.
 *
 * @throws ProblemError `invalid` at `after` for a cursor that was not made here or not for this order.
 */
export async function listPage<Sort extends string, Row extends { readonly id: string }>(
  { table, orders, request, filter, load }: Listing<Sort, Row>,
  knex: Knex,
): Promise<Page<Row>> {
  const { keys, direction } = orders[request.sort];
  const cursor = request.after === undefined ? undefined : readCursor(request.after, request.sort, keys);

  return inSearch(knex, async (trx) => {
    const matching = trx(table).modify(filter);
    const id = trx.ref(`${table}.id`);
    const expressions = [...keys.map(({ as, column }) => trx.raw(EXPRESSIONS[as], [column])), id];
    const keyColumns = expressions.map((expression, place) => trx.raw('(?)::text as ??', [expression, keyName(place)]));
    const page = matching.clone().select(id, ...keyColumns);
    if (cursor) {
      const values = [...keys.map(({ as }, place) => trx.raw(VALUES[as], [cursor.values[place] ?? ''])), trx.raw('?::uuid', [cursor.id])];
      page.whereRaw(direction === 'asc' ? '(?) > (?)' : '(?) < (?)', [listed(expressions, trx), listed(values, trx)]);
    }
    for (const expression of expressions) page.orderBy(expression, direction);
    page.limit(request.limit + 1);

    const found = z.array(z.looseObject({ id: z.string() })).parse(await page);
    const shown = found.slice(0, request.limit);
    const last = found.length > request.limit ? shown.at(-1) : undefined;
    const rows = shown.length === 0 ? [] : await load(shown.map((one) => one.id), trx);
    const byId = new Map(rows.map((row) => [row.id, row]));
    return {
      items: shown.flatMap((one) => byId.get(one.id) ?? []),
      next: last ? writeCursor({ sort: request.sort, values: keys.map((_, place) => String(last[keyName(place)])), id: last.id }) : null,
      ...(cursor ? {} : { total: await countOf(matching) }),
    };
  });
}

function listed(parts: readonly (Knex.Raw | Knex.Ref<string, Record<string, string>>)[], trx: Knex.Transaction): Knex.Raw {
  return trx.raw(parts.map(() => '?').join(', '), [...parts]);
}

async function countOf(matching: Knex.QueryBuilder): Promise<number> {
  const [row] = z.array(z.object({ count: z.string() })).parse(await matching.clone().count({ count: '*' }));
  return Number(row?.count ?? 0);
}

function keyName(place: number): string {
  return `key${place}`;
}

type Cursor = { readonly sort: string; readonly values: readonly string[]; readonly id: string };

function writeCursor({ sort, values, id }: Cursor): string {
  return Buffer.from(JSON.stringify([sort, ...values, id])).toString('base64url');
}

function readCursor(text: string, sort: string, keys: readonly SortKey[]): Cursor {
  const shape = z.tuple([z.literal(sort), ...keys.map(({ as }) => CURSOR_VALUES[as]), z.uuid()]);
  const parsed = shape.safeParse(jsonOf(Buffer.from(text, 'base64url').toString('utf8')));
  const parts = parsed.success ? z.array(z.string()).parse(parsed.data) : [];
  const id = parts.at(-1);
  if (id === undefined) {
    throw new ProblemError('invalid', 'See which, and why, under errors.', {
      errors: [{ path: ['after'], message: 'Not a cursor of this list in this order; start again without it' }],
    });
  }
  return { sort, values: parts.slice(1, -1), id };
}

function jsonOf(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}
