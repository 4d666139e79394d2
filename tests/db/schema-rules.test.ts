import { describe, expect, test } from 'vitest';
import {
  CONTRIBUTION_STATES,
  DATE_MEANINGS,
  DATE_PRECISIONS,
  DECISIONS,
  FACT_KINDS,
  FITMENT_VERDICTS,
  INTERCHANGES,
  MACHINE_KINDS,
  MEASURE_UNITS,
  SOURCE_KINDS,
  WEAR_DIRECTIONS,
} from '#domain/vocabulary.ts';
import { RANGE_STANDINGS } from '#domain/serials/build-window.ts';
import { useDatabase } from '#tests/support/database.ts';

const database = useDatabase();

async function lines(query: string): Promise<readonly string[]> {
  const { rows } = await database.knex.raw<{ rows: { line: string }[] }>(query);
  return rows.map((row) => row.line);
}

const OUR_TABLES = `c.relnamespace = 'public'::regnamespace and c.relkind = 'r' and c.relname not like 'migrations%'`;

describe('the schema as a whole', () => {
  test('every foreign key has an index to look from', async () => {
    const bare = await lines(`
      select k.conname as line from pg_constraint k join pg_class c on c.oid = k.conrelid
       where k.contype = 'f' and ${OUR_TABLES}
         and not exists (select from pg_index i where i.indrelid = k.conrelid and i.indkey[0] = any (k.conkey))`);
    expect(bare).toEqual([]);
  });

  test('every foreign key says what becomes of it when its target goes', async () => {
    const silent = await lines(`
      select k.conname as line from pg_constraint k join pg_class c on c.oid = k.conrelid
       where k.contype = 'f' and k.confdeltype = 'a' and ${OUR_TABLES}`);
    expect(silent).toEqual([]);
  });

  test('every table has a primary key, and no column is a local timestamp or an unbounded varchar', async () => {
    expect(
      await lines(`select c.relname as line from pg_class c where ${OUR_TABLES}
         and not exists (select from pg_constraint k where k.conrelid = c.oid and k.contype = 'p')`),
    ).toEqual([]);
    expect(
      await lines(`select a.attname as line from pg_attribute a join pg_class c on c.oid = a.attrelid
         where ${OUR_TABLES} and a.attnum > 0 and a.atttypid in ('timestamp'::regtype, 'varchar'::regtype, 'json'::regtype)`),
    ).toEqual([]);
  });

  /**
   * A CHECK passes on NULL. Each of these means to: an absent value breaks no rule, or the check itself asks whether it is there.
   * Told of the catalogue, whose tables hold facts or refer to them.
   */
  test('the checks of the catalogue over columns that may be null are known', async () => {
    const checks = await lines(`
      select k.conname as line from pg_constraint k join pg_class c on c.oid = k.conrelid
       where k.contype = 'c' and (c.relname in ('sources', 'cipher_versions') or exists (
               select from pg_constraint f where f.conrelid = c.oid and f.confrelid = 'facts'::regclass))
         and exists (select from pg_attribute a where a.attrelid = k.conrelid and a.attnum = any (k.conkey) and not a.attnotnull)
       order by k.conname`);
    expect(checks).toEqual([
      'cipher_versions_brought_back_check',
      'cipher_versions_not_ones_own_check',
      'cipher_versions_superseded_check',
      'contributions_base_check',
      'contributions_base_version_check',
      'contributions_decided_at_check',
      'contributions_decided_check',
      'contributions_entered_check',
      'contributions_entered_version_check',
      'contributions_not_ones_own_check',
      'contributions_put_forward_at_check',
      'contributions_put_forward_check',
      'fact_sources_field_check',
      'fact_versions_brought_back_check',
      'fact_versions_not_ones_own_check',
      'fact_versions_superseded_check',
      'fitments_numbers_need_series_check',
      'flags_not_ones_own_check',
      'flags_outcome_check',
      'flags_settled_at_check',
      'flags_settled_check',
      'makers_foundry_mark_check',
      'makers_years_check',
      'mark_decodings_both_cipher_check',
      'mark_decodings_cipher_version_check',
      'mark_decodings_status_total_check',
      'positions_lead_check',
      'reworks_finished_at_check',
      'reworks_finished_check',
      'reworks_total_check',
      'reworks_version_check',
      'sources_addressee_check',
      'sources_author_check',
      'sources_dated_check',
      'sources_drawing_number_check',
      'sources_member_check',
      'sources_publisher_check',
      'sources_sheet_check',
      'sources_subject_check',
      'sources_year_check',
      'wear_limits_as_built_check',
      'wear_limits_as_built_from_check',
      'wear_limits_as_built_to_check',
      'wear_limits_new_part_check',
    ]);
  });

  test('a search by number is answered from its index', async () => {
    await database.knex.raw('set local enable_seqscan = off');
    const { rows } = await database.knex.raw<{ rows: Record<string, string>[] }>(
      `explain select id from castings where number_key like 'B44%0_'`,
    );
    expect(rows.map((row) => row['QUERY PLAN']).join('\n')).toContain('castings_number_key');
  });
});

describe('the words of the columns are those of the vocabulary', () => {
  test.each<[string, string, readonly string[]]>([
    ['facts_kind_check', 'facts', FACT_KINDS],
    ['contributions_kind_check', 'contributions', FACT_KINDS],
    ['contributions_state_check', 'contributions', CONTRIBUTION_STATES],
    ['contribution_decisions_decision_check', 'contribution_decisions', DECISIONS],
    ['wear_limits_unit_check', 'wear_limits', MEASURE_UNITS],
    ['wear_limits_direction_check', 'wear_limits', WEAR_DIRECTIONS],
    ['sources_kind_check', 'sources', SOURCE_KINDS],
    ['fitments_verdict_check', 'fitments', FITMENT_VERDICTS],
    ['supersessions_interchange_check', 'supersessions', INTERCHANGES],
    ['serial_ranges_standing_check', 'serial_ranges', RANGE_STANDINGS],
    ['machine_kind_check', 'machine_kind', MACHINE_KINDS],
    ['date_meaning_check', 'date_meaning', DATE_MEANINGS],
    ['date_precision_check', 'date_precision', DATE_PRECISIONS],
  ])('%s', async (constraint, _, words) => {
    const [definition = ''] = await lines(
      `select pg_get_constraintdef(oid) as line from pg_constraint where conname = '${constraint}'`,
    );
    expect([...definition.matchAll(/'([^']*)'::text/g)].map(([, word]) => word)).toEqual([...words]);
  });
});
