import type { Knex } from 'knex';

/** Castings, how to tell them, the part numbers they were machined into, and what followed them. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table castings (
      id uuid primary key,
      kind text not null generated always as ('casting') stored,
      maker_id uuid not null references makers on delete restrict,
      poured_by_id uuid,
      poured_by_pours_iron boolean generated always as (case when poured_by_id is not null then true end) stored,
      part_type_id uuid not null references part_types on delete restrict,
      slug slug not null unique,
      -- As it stands on the casting; the key is what a search compares.
      number text not null check (number ~ '^[A-Z0-9]([A-Z0-9 ./-]{0,30}[A-Z0-9]){0,1}$'),
      number_key text not null generated always as (regexp_replace(number, '[^A-Z0-9]', '', 'g')) stored,
      pattern label,
      made open_day_span,
      note prose,
      foreign key (id, kind) references facts (id, kind) on delete restrict,
      foreign key (poured_by_id, poured_by_pours_iron) references makers (id, pours_iron) on delete restrict,
      unique (id, part_type_id),
      constraint castings_key unique nulls not distinct (maker_id, number_key, poured_by_id, pattern)
    );

    create index castings_poured_by on castings (poured_by_id, poured_by_pours_iron);
    create index castings_part_type on castings (part_type_id);
    create index castings_number_key on castings using gin (number_key gin_trgm_ops);

    create table casting_tells (
      casting_id uuid not null references castings on delete cascade,
      ordinal smallint not null check (ordinal >= 1),
      place label not null,
      tell prose not null,
      primary key (casting_id, ordinal)
    );

    create table casting_part_numbers (
      casting_id uuid not null references castings on delete cascade,
      ordinal smallint not null check (ordinal >= 1),
      number text not null check (number ~ '^[A-Z0-9]([A-Z0-9 ./-]{0,30}[A-Z0-9]){0,1}$'),
      number_key text not null generated always as (regexp_replace(number, '[^A-Z0-9]', '', 'g')) stored,
      note prose,
      primary key (casting_id, ordinal),
      unique (casting_id, number_key)
    );

    create index casting_part_numbers_number_key on casting_part_numbers using gin (number_key gin_trgm_ops);

    create table supersessions (
      id uuid primary key,
      kind text not null generated always as ('supersession') stored,
      part_type_id uuid not null references part_types on delete restrict,
      old_id uuid not null,
      new_id uuid not null,
      interchange text not null check (interchange in ('both-ways', 'new-for-old')),
      note prose,
      foreign key (id, kind) references facts (id, kind) on delete restrict,
      foreign key (old_id, part_type_id) references castings (id, part_type_id) on update cascade on delete restrict,
      foreign key (new_id, part_type_id) references castings (id, part_type_id) on update cascade on delete restrict,
      unique (old_id, new_id),
      constraint supersessions_two_castings_check check (old_id <> new_id)
    );

    create index supersessions_part_type on supersessions (part_type_id);
    create index supersessions_old on supersessions (old_id, part_type_id);
    create index supersessions_new on supersessions (new_id, part_type_id);

    create function supersessions_refuse_cycle() returns trigger language plpgsql as $$
    begin
      -- Two transactions that each add half of a cycle cannot see each other: one waits here for the other.
      perform pg_advisory_xact_lock('supersessions'::regclass::oid::bigint);
      if exists (
        with recursive later (id) as (
          select new.new_id
          union
          select s.new_id from supersessions s join later on s.old_id = later.id
        )
        select from later where id = new.old_id
      ) then
        raise exception 'a casting cannot come to follow itself'
          using errcode = 'check_violation', constraint = 'supersessions_no_cycle', table = 'supersessions';
      end if;
      return null;
    end
    $$;

    create trigger supersessions_no_cycle after insert or update on supersessions
      for each row execute function supersessions_refuse_cycle();
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table supersessions, casting_part_numbers, casting_tells, castings;
    drop function supersessions_refuse_cycle();
  `);
}
