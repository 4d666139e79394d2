import type { Knex } from 'knex';
import { z } from 'zod';
import { nameFacts } from './name-facts.ts';
import { nativeOf } from './refusal-of.ts';

/** Names enough for anybody to see what it is about. */
const MOST_NAMED = 5;

const Columns = z.array(z.object({ name: z.string() }));
const Ids = z.array(z.object({ id: z.string() }));

/** What refers to a fact whose row the database would not let go, in a sentence. `refused` is what it raised. */
export async function sayReferrers(refused: unknown, factId: string, trx: Knex.Transaction): Promise<string> {
  const { table, constraint } = nativeOf(refused);
  if (table === undefined || constraint === undefined) return 'Other facts rest on it.';
  // Of a key of several columns the first is the id.
  const columns: unknown = await trx('pg_constraint')
    .join('pg_attribute', (on) => void on.on('attrelid', 'conrelid').andOn('attnum', trx.raw('conkey[1]')))
    .where({ conname: constraint })
    .whereRaw('conrelid = ?::regclass', [table])
    .select({ name: 'attname' });
  const [column] = Columns.parse(columns);
  const hasId = await trx.schema.hasColumn(table, 'id');
  if (!column || !hasId) return 'What is on record besides the catalogue rests on it.';
  const rows: unknown = await trx(table).whereRaw('?? = ?', [column.name, factId]).select('id').limit(MOST_NAMED + 1);
  const names = [...(await nameFacts(Ids.parse(rows).map(({ id }) => id), trx)).values()].map(({ title }) => title);
  if (names.length === 0) return 'Machines or parts on record rest on it.';
  const more = names.length > MOST_NAMED ? ' and more' : '';
  return `Other facts rest on it: ${names.slice(0, MOST_NAMED).join('; ')}${more}.`;
}
