import type { Knex } from 'knex';

/** Models, part types, and the checklist of positions each model has. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table models (
      id uuid primary key,
      kind text not null generated always as ('model') stored,
      maker_id uuid not null,
      maker_builds_machines boolean not null generated always as (true) stored,
      slug slug not null unique,
      name label not null,
      machine_kind machine_kind not null,
      made open_day_span,
      note prose,
      foreign key (id, kind) references facts (id, kind) on delete restrict,
      foreign key (maker_id, maker_builds_machines) references makers (id, builds_machines) on delete restrict,
      unique (maker_id, name),
      unique (id, maker_id)
    );

    create index models_maker on models (maker_id, maker_builds_machines);

    create table part_types (
      id uuid primary key,
      kind text not null generated always as ('part-type') stored,
      slug slug not null unique,
      name label not null unique,
      note prose,
      caution prose,
      foreign key (id, kind) references facts (id, kind) on delete restrict
    );

    create table positions (
      id uuid primary key,
      kind text not null generated always as ('position') stored,
      model_id uuid not null references models on delete restrict,
      part_type_id uuid not null references part_types on delete restrict,
      slug slug not null,
      name label not null,
      ordinal smallint not null check (ordinal >= 1),
      weight numeric(6, 3) not null default 1 check (weight > 0 and weight <> 'NaN'),
      -- Days from casting to the machine's assembly, least to most; no last day: any older casting is accepted.
      lead int4range,
      note prose,
      foreign key (id, kind) references facts (id, kind) on delete restrict,
      unique (model_id, slug),
      unique (model_id, name),
      unique (model_id, ordinal),
      unique (id, model_id, part_type_id),
      constraint positions_lead_check check (lead is null or (not isempty(lead) and not lower_inf(lead) and lower(lead) >= 0))
    );

    create index positions_part_type on positions (part_type_id);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`drop table positions, part_types, models;`);
}
