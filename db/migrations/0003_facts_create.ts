import type { Knex } from 'knex';

/**
 * Every row of the catalogue is a fact. Its own table holds what is in force now; `facts` gives it one identity, so that
 * versions and sources refer to it by a real foreign key; `fact_versions` keeps everything that was ever in force.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table facts (
      id uuid primary key,
      kind text not null check (kind in (
        'maker', 'works', 'model', 'part-type', 'position', 'casting', 'fitment', 'supersession',
        'series', 'serial-range', 'anchor', 'cipher'
      )),
      unique (id, kind)
    );

    create table fact_versions (
      fact_id uuid not null,
      kind text not null,
      number integer not null check (number >= 1),
      -- The foreign key on it leaves no gap in the numbers.
      previous integer generated always as (nullif(number - 1, 0)) stored,
      payload jsonb not null check (jsonb_typeof(payload) = 'object'),
      entered_by_id uuid not null references members on delete restrict,
      entered_at timestamptz not null check (isfinite(entered_at)),
      reason prose not null,
      superseded_at timestamptz,
      primary key (fact_id, number),
      foreign key (fact_id, kind) references facts (id, kind) on delete restrict,
      constraint fact_versions_previous_fkey
        foreign key (fact_id, previous) references fact_versions (fact_id, number) on delete restrict,
      constraint fact_versions_kind_check check (kind <> 'cipher'),
      constraint fact_versions_superseded_check
        check (superseded_at is null or (isfinite(superseded_at) and superseded_at >= entered_at))
    );

    create unique index fact_versions_one_in_force on fact_versions (fact_id) where superseded_at is null;
    create index fact_versions_entered_by on fact_versions (entered_by_id);

    create function versions_keep_history() returns trigger language plpgsql as $$
    begin
      if tg_op = 'UPDATE' and old.superseded_at is null
         and to_jsonb(new) - 'superseded_at' = to_jsonb(old) - 'superseded_at' then
        return null;
      end if;
      raise exception 'a version is kept as it was entered; it can only be superseded'
        using errcode = 'restrict_violation', table = tg_table_name;
    end
    $$;

    -- After the row is written: a generated column has no value before.
    create trigger fact_versions_keep_history after update or delete on fact_versions
      for each row execute function versions_keep_history();
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table fact_versions, facts;
    drop function versions_keep_history();
  `);
}
