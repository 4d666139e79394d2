import type { Knex } from 'knex';

const TABLES_OF_FACTS = [
  'makers',
  'works',
  'models',
  'part_types',
  'positions',
  'castings',
  'fitments',
  'supersessions',
  'series',
  'serial_ranges',
  'anchors',
  'ciphers',
];

/**
 * What no single row can say, held at commit: every fact has its row, its latest version is in force, and it stands on a source;
 * a position's lead stands on a source of its own.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create function facts_check_whole() returns trigger language plpgsql as $$
    declare
      fact uuid;
      fact_kind text;
      fact_table text;
      has_row boolean;
      in_force boolean;
    begin
      fact := case tg_argv[0]
        when 'id' then coalesce(to_jsonb(new) ->> 'id', to_jsonb(old) ->> 'id')
        when 'fact_id' then to_jsonb(old) ->> 'fact_id'
        when 'cipher_id' then to_jsonb(old) ->> 'cipher_id'
      end;
      select kind into fact_kind from facts where id = fact;
      if not found then
        return null;
      end if;

      fact_table := case fact_kind
        when 'maker' then 'makers'
        when 'works' then 'works'
        when 'model' then 'models'
        when 'part-type' then 'part_types'
        when 'position' then 'positions'
        when 'casting' then 'castings'
        when 'fitment' then 'fitments'
        when 'supersession' then 'supersessions'
        when 'series' then 'series'
        when 'serial-range' then 'serial_ranges'
        when 'anchor' then 'anchors'
        when 'cipher' then 'ciphers'
      end;
      execute format('select exists (select from %I where id = $1)', fact_table) into has_row using fact;
      if not has_row then
        raise exception 'fact % has no row in its table', fact
          using errcode = 'check_violation', constraint = 'facts_have_a_row', table = 'facts';
      end if;

      if fact_kind = 'cipher' then
        select superseded_at is null into in_force from cipher_versions where cipher_id = fact order by number desc limit 1;
      else
        select superseded_at is null into in_force from fact_versions where fact_id = fact order by number desc limit 1;
      end if;
      if in_force is not true then
        raise exception 'fact % has no version in force', fact
          using errcode = 'check_violation', constraint = 'facts_have_a_version_in_force', table = 'facts';
      end if;

      if not exists (select from fact_sources where fact_id = fact) then
        raise exception 'fact % stands on no source', fact
          using errcode = 'check_violation', constraint = 'facts_have_a_source', table = 'facts';
      end if;
      return null;
    end
    $$;

    create function positions_check_lead_source() returns trigger language plpgsql as $$
    declare
      place uuid := case tg_argv[0] when 'id' then to_jsonb(new) ->> 'id' else to_jsonb(old) ->> 'fact_id' end;
    begin
      if exists (select from positions where id = place and lead is not null)
         and not exists (select from fact_sources where fact_id = place and field = 'lead') then
        raise exception 'the lead of position % stands on no source', place
          using errcode = 'check_violation', constraint = 'positions_lead_has_a_source', table = 'positions';
      end if;
      return null;
    end
    $$;

    create constraint trigger facts_whole after insert on facts
      deferrable initially deferred for each row execute function facts_check_whole('id');
    create constraint trigger fact_versions_whole after update on fact_versions
      deferrable initially deferred for each row execute function facts_check_whole('fact_id');
    create constraint trigger cipher_versions_whole after update on cipher_versions
      deferrable initially deferred for each row execute function facts_check_whole('cipher_id');
    create constraint trigger fact_sources_whole after update or delete on fact_sources
      deferrable initially deferred for each row execute function facts_check_whole('fact_id');
    create constraint trigger positions_lead_sourced after insert or update on positions
      deferrable initially deferred for each row execute function positions_check_lead_source('id');
    create constraint trigger fact_sources_lead_sourced after update or delete on fact_sources
      deferrable initially deferred for each row execute function positions_check_lead_source('fact_id');
  `);
  for (const table of TABLES_OF_FACTS) {
    await knex.raw(
      `create constraint trigger ?? after delete on ??
         deferrable initially deferred for each row execute function facts_check_whole('id')`,
      [`${table}_whole`, table],
    );
  }
}

export async function down(knex: Knex): Promise<void> {
  for (const table of TABLES_OF_FACTS) await knex.raw('drop trigger ?? on ??', [`${table}_whole`, table]);
  await knex.raw(`
    drop trigger fact_sources_lead_sourced on fact_sources;
    drop trigger positions_lead_sourced on positions;
    drop trigger fact_sources_whole on fact_sources;
    drop trigger cipher_versions_whole on cipher_versions;
    drop trigger fact_versions_whole on fact_versions;
    drop trigger facts_whole on facts;
    drop function positions_check_lead_source();
    drop function facts_check_whole();
  `);
}
