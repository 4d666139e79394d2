import type { Knex } from 'knex';

/** Parts on record, each one piece of iron, and where each was fitted when. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table parts (
      id uuid primary key,
      holder_id uuid not null references members on delete restrict,
      part_type_id uuid references part_types on delete restrict,
      -- Whose it is by its holder's word; the casting, once it is known, says it for certain.
      maker_id uuid references makers on delete restrict,
      -- The catalogue's entry its number leads to, kept up by the jobs that work out again what rests on a fact.
      casting_id uuid references castings on delete set null,
      visibility visibility not null default 'private'
    );

    create index parts_holder on parts (holder_id);
    create index parts_part_type on parts (part_type_id);
    create index parts_maker on parts (maker_id);
    create index parts_casting on parts (casting_id);

    alter table positions add constraint positions_id_model_id_key unique (id, model_id);

    create table part_fittings (
      id uuid primary key,
      part_id uuid not null references parts on delete cascade,
      machine_id uuid not null,
      position_id uuid not null,
      -- Carried along so that a part is only ever at a position of its machine's model.
      model_id uuid not null,
      -- First and last day it is known to have been there; no last day: it is there now.
      fitted open_day_span not null,
      foreign key (machine_id, model_id) references machines (id, model_id) on delete cascade,
      foreign key (position_id, model_id) references positions (id, model_id) on delete restrict,
      constraint part_fittings_one_machine exclude using gist (part_id with =, fitted with &&),
      constraint part_fittings_one_part exclude using gist (machine_id with =, position_id with =, fitted with &&)
    );

    create index part_fittings_part on part_fittings (part_id);
    create index part_fittings_machine on part_fittings (machine_id, model_id);
    create index part_fittings_position on part_fittings (position_id, model_id);

    -- Who made and who poured each part, as far as that is known.
    create view part_origins as
      select parts.id as part_id,
             coalesce(castings.maker_id, parts.maker_id) as maker_id,
             coalesce(castings.poured_by_id, castings.maker_id) as foundry_id
        from parts left join castings on castings.id = parts.casting_id;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop view part_origins;
    drop table part_fittings;
    alter table positions drop constraint positions_id_model_id_key;
    drop table parts;
  `);
}
