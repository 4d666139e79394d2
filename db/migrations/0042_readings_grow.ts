import type { Knex } from 'knex';

/**
 * Readings by several members. A reading says whether it was made without seeing others', from which photo, and whether it was taken back;
 * the reading in force is set glyph by glyph from the independent ones, which no statement of SQL can do: the trigger that counted whole texts
 * goes, and whoever writes readings settles the mark in the same transaction.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    drop trigger readings_settle_mark on readings;
    drop function readings_settle_mark();

    alter table readings
      add column photo_id uuid references photos on delete set null,
      -- Made before its reader was shown what others had read.
      add column independent boolean not null default true,
      -- By whoever held the part then.
      add column as_holder boolean not null default false,
      add column taken_back_at timestamptz check (isfinite(taken_back_at)),
      add constraint readings_taken_back_check check (taken_back_at >= made_at);

    update readings set as_holder = true
      from marks join parts on parts.id = marks.part_id
     where marks.id = readings.mark_id and parts.holder_id = readings.reader_id;

    create index readings_photo on readings (photo_id);

    alter table marks
      add column revision integer not null default 1 check (revision >= 1),
      add column evidence text not null default 'claimed' check (evidence in ('claimed', 'photographed', 'confirmed', 'documented')),
      -- Since when another reading is wanted; null: none is.
      add column wants_reading_since timestamptz check (isfinite(wants_reading_since)),
      -- When the newest reading that counts was made.
      add column read_at timestamptz check (isfinite(read_at)),
      add column reading_key text generated always as (replace(reading, '-', '')) stored,
      add constraint marks_read_check check ((reading is null) = (read_at is null)) not valid;

    update marks set read_at = (select max(made_at) from readings where mark_id = marks.id);
    alter table marks validate constraint marks_read_check;

    create index marks_wanting on marks (wants_reading_since, id) where wants_reading_since is not null;
    -- Those that nobody has read come last.
    create index marks_read on marks (coalesce(read_at, to_timestamp(0)) desc, id desc);
    create index marks_reading_key on marks using gin (reading_key gin_trgm_ops);
    -- A search by number tries these one by one: what they say is not what they spell.
    create index marks_reading_unsure on marks (id) where reading_key ~ '[^A-Z0-9]';

    -- Who was shown what others read, and so no longer reads independently.
    create table mark_looks (
      mark_id uuid not null references marks on delete cascade,
      member_id uuid not null references members on delete restrict,
      at timestamptz not null default now() check (isfinite(at)),
      primary key (mark_id, member_id)
    );

    create index mark_looks_member on mark_looks (member_id);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table mark_looks;
    alter table marks
      drop column reading_key, drop column read_at, drop column wants_reading_since, drop column evidence, drop column revision;
    alter table readings
      drop column taken_back_at, drop column as_holder, drop column independent, drop column photo_id;

    create function readings_settle_mark() returns trigger language plpgsql as $$
    declare
      read_mark uuid := coalesce(to_jsonb(new) ->> 'mark_id', to_jsonb(old) ->> 'mark_id');
    begin
      perform from marks where id = read_mark for no key update;
      update marks set reading = (
        select told.text
          from (
            select distinct on (reader_id) text, made_at from readings where mark_id = read_mark
             order by reader_id, made_at desc, id desc
          ) told
         group by told.text
         order by count(*) desc, max(told.made_at) desc, told.text
         limit 1
      ) where id = read_mark;
      return null;
    end
    $$;

    create trigger readings_settle_mark after insert or update or delete on readings
      for each row execute function readings_settle_mark();
  `);
}
