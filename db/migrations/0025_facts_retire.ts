import type { Knex } from 'knex';

/**
 * A fact that was wrong leaves the catalogue and is not lost: its versions stay, none of them in force. So a fact is whole at commit in
 * one of two ways: it has its row, its latest version is in force and it stands on a source; or it has none of the three and a row here
 * says who retired its latest version.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table fact_retirements (
      fact_id uuid not null references facts on delete restrict,
      -- The version that was in force.
      version integer not null check (version >= 1),
      retired_by_id uuid not null references members on delete restrict,
      at timestamptz not null check (isfinite(at)),
      reason prose not null,
      primary key (fact_id, version)
    );

    create index fact_retirements_retired_by on fact_retirements (retired_by_id);

    create trigger fact_retirements_only_grow before update or delete on fact_retirements
      for each row execute function rows_only_grow();

    create or replace function facts_check_whole() returns trigger language plpgsql as $$
    declare
      fact uuid;
      fact_kind text;
      fact_table text;
      has_row boolean;
      latest integer;
      in_force boolean;
      is_retired boolean;
    begin
      fact := case tg_argv[0]
        when 'id' then coalesce(to_jsonb(new) ->> 'id', to_jsonb(old) ->> 'id')
        when 'fact_id' then coalesce(to_jsonb(new) ->> 'fact_id', to_jsonb(old) ->> 'fact_id')
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
        when 'wear-limit' then 'wear_limits'
      end;
      execute format('select exists (select from %I where id = $1)', fact_table) into has_row using fact;

      if fact_kind = 'cipher' then
        select number, superseded_at is null into latest, in_force
          from cipher_versions where cipher_id = fact order by number desc limit 1;
      else
        select number, superseded_at is null into latest, in_force
          from fact_versions where fact_id = fact order by number desc limit 1;
      end if;

      is_retired := exists (select from fact_retirements where fact_id = fact and version = latest);
      if is_retired then
        if has_row or in_force or exists (select from fact_sources where fact_id = fact) then
          raise exception 'fact % is retired and still stands in the catalogue', fact
            using errcode = 'check_violation', constraint = 'facts_retired_are_gone', table = 'facts';
        end if;
        return null;
      end if;

      if not has_row then
        raise exception 'fact % has no row in its table', fact
          using errcode = 'check_violation', constraint = 'facts_have_a_row', table = 'facts';
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

    create constraint trigger fact_retirements_whole after insert on fact_retirements
      deferrable initially deferred for each row execute function facts_check_whole('fact_id');
    create constraint trigger wear_limits_whole after delete on wear_limits
      deferrable initially deferred for each row execute function facts_check_whole('id');

    -- A cipher's versions outlive its row: they belong to the fact.
    alter table cipher_versions drop constraint cipher_versions_cipher_id_fkey;
    alter table cipher_versions add column kind text not null generated always as ('cipher') stored;
    alter table cipher_versions
      add constraint cipher_versions_cipher_id_fkey foreign key (cipher_id, kind) references facts (id, kind) on delete restrict;
  `);
}

/** Refused while anything is retired: there is nowhere to put it. */
export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table cipher_versions drop constraint cipher_versions_cipher_id_fkey;
    alter table cipher_versions drop column kind;
    alter table cipher_versions
      add constraint cipher_versions_cipher_id_fkey foreign key (cipher_id) references ciphers on delete restrict;
    drop trigger wear_limits_whole on wear_limits;
    drop trigger fact_retirements_whole on fact_retirements;
    drop table fact_retirements;

    create or replace function facts_check_whole() returns trigger language plpgsql as $$
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
  `);
}
