import type { Knex } from 'knex';
import pg from 'pg';
import { parseCountRange, parseDateRange, parseNumberRange } from './ranges.ts';

/**
 * What the values of each PostgreSQL type become. Everything not named here is as the driver has it (text, boolean, int2, int4, jsonb, uuid).
 *
 * - `date` stays `YYYY-MM-DD`. The driver makes local midnight of it, which west or east of Greenwich is another day in UTC.
 * - `timestamptz` becomes ISO 8601 text in UTC, to the millisecond, so that an instant looks the same in a row, an answer and a test.
 * - `int8` stays text: serials are larger than a double holds, and so `count(*)` is text too.
 * - `numeric` becomes a number: the register has one such column, a position's weight of six digits, which a double holds.
 * - ranges become `{ from, to }` with both ends included (ranges.ts).
 *
 * The parsers hold for the connections that ask for them, not for every user of the driver in the process.
 */
const PARSERS = new Map<number, (text: string) => unknown>([
  [20, String], // int8
  [1082, String], // date
  [1182, parseDays], // date[]
  [1184, parseInstant], // timestamptz
  [1700, Number], // numeric
  [3904, parseCountRange], // int4range
  [3912, parseDateRange], // daterange
  [3926, parseNumberRange], // int8range
]);

/** The `types` setting of a connection. */
export function registerTypes(): Knex.PgCustomTypesConfig {
  const types = new pg.TypeOverrides();
  for (const [oid, parse] of PARSERS) types.setTypeParser(oid, 'text', parse);
  return {
    getTypeParser: (oid, format): unknown => {
      const parse: unknown = types.getTypeParser(oid, format === 'binary' ? 'binary' : 'text');
      return parse;
    },
  };
}

/** `{1941-02-10,1941-03-10}`: days need no quotes. */
function parseDays(text: string): readonly (string | null)[] {
  return text === '{}'
    ? []
    : text
        .slice(1, -1)
        .split(',')
        .map((day) => (day === 'NULL' ? null : day));
}

/** PostgreSQL writes `1941-02-10 06:30:00.5+00`; an offset without minutes is no ISO 8601. */
function parseInstant(text: string): string {
  return new Date(text.replace(' ', 'T').replace(/([+-]\d\d)$/, '$1:00')).toISOString();
}
