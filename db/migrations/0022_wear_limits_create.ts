import type { Knex } from 'knex';

/** How far a measure of a part may wear: one more kind of fact. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table facts drop constraint facts_kind_check;
    alter table facts add constraint facts_kind_check check (kind in (
      'maker', 'works', 'model', 'part-type', 'position', 'casting', 'fitment', 'supersession',
      'series', 'serial-range', 'anchor', 'cipher', 'wear-limit'
    ));

    create table wear_limits (
      id uuid primary key,
      kind text not null generated always as ('wear-limit') stored,
      part_type_id uuid not null references part_types on delete restrict,
      -- Null: on every model.
      model_id uuid references models on delete restrict,
      measure label not null,
      unit text not null check (unit in ('mm', 'in', 'degree', 'gram', 'newton-metre')),
      -- Smallest and largest of a new part; no largest: nobody says.
      as_built_from numeric(10, 4) check (as_built_from <> 'NaN'),
      as_built_to numeric(10, 4) check (as_built_to <> 'NaN'),
      direction text not null check (direction in ('most', 'least')),
      wears_to numeric(10, 4) not null check (wears_to <> 'NaN'),
      method prose,
      note prose,
      foreign key (id, kind) references facts (id, kind) on delete restrict,
      constraint wear_limits_key unique nulls not distinct (part_type_id, model_id, measure),
      constraint wear_limits_as_built_check
        check (as_built_to is null or (as_built_from is not null and as_built_from <= as_built_to)),
      -- A new part is within its limit.
      constraint wear_limits_new_part_check check (
        as_built_from is null
        or case direction when 'most' then wears_to >= coalesce(as_built_to, as_built_from) else wears_to <= as_built_from end
      )
    );

    create index wear_limits_model on wear_limits (model_id);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table wear_limits;
    alter table facts drop constraint facts_kind_check;
    alter table facts add constraint facts_kind_check check (kind in (
      'maker', 'works', 'model', 'part-type', 'position', 'casting', 'fitment', 'supersession',
      'series', 'serial-range', 'anchor', 'cipher'
    ));
  `);
}
