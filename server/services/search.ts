import type { Knex } from 'knex';

/**
 * Runs a search that somebody's own pattern drives, under a limit of two seconds a statement; one that takes longer fails as
 * `unavailable` instead of holding a connection.
 */
export async function inSearch<Answer>(knex: Knex, search: (trx: Knex.Transaction) => Promise<Answer>): Promise<Answer> {
  return knex.transaction(async (trx) => {
    await trx.raw(`set local statement_timeout = '2s'`);
    return search(trx);
  });
}

/** Narrows a query to rows that hold the text in one of the columns, in any case. */
export function matchText(query: Knex.QueryBuilder, columns: readonly string[], text: string): void {
  void query.where((any) => {
    for (const column of columns) void any.orWhereILike(column, anywhere(text));
  });
}

/** A LIKE pattern that finds the text anywhere, whatever it holds: `%`, `_` and the escape itself stand for themselves. */
function anywhere(text: string): string {
  return `%${text.replaceAll(/[\\%_]/g, String.raw`\$&`)}%`;
}
