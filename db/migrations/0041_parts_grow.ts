import type { Knex } from 'knex';

/** What a holder says of a part, its photos, and those of its marks with the place each mark stands at. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table parts
      add column called label check (char_length(called) <= 120),
      -- Where it was found, by its holder's word; the machine need not be on record.
      add column found_model_id uuid references models on delete set null,
      add column found_serial text check (found_serial <> '' and char_length(found_serial) <= 40),
      add column condition prose check (char_length(condition) <= 2000),
      -- For the holder alone.
      add column note prose,
      add column revision integer not null default 1 check (revision >= 1),
      add column recorded_at timestamptz not null default now() check (isfinite(recorded_at));

    create index parts_found_model on parts (found_model_id);
    create index parts_holder_recorded on parts (holder_id, recorded_at desc, id desc);

    create table part_photos (
      part_id uuid not null references parts on delete cascade,
      photo_id uuid not null references photos on delete cascade,
      ordinal smallint not null check (ordinal >= 0),
      primary key (part_id, photo_id),
      unique (part_id, ordinal) deferrable initially deferred
    );

    create index part_photos_photo on part_photos (photo_id);

    create table mark_photos (
      mark_id uuid not null references marks on delete cascade,
      photo_id uuid not null references photos on delete cascade,
      ordinal smallint not null check (ordinal >= 0),
      -- Shares of the upright picture's width and height, from its upper left corner.
      region_left double precision check (region_left between 0 and 1),
      region_top double precision check (region_top between 0 and 1),
      region_width double precision check (region_width > 0 and region_width <= 1),
      region_height double precision check (region_height > 0 and region_height <= 1),
      -- Degrees clockwise that make it read.
      turn double precision not null default 0 check (turn between -180 and 180),
      mirrored boolean not null default false,
      primary key (mark_id, photo_id),
      unique (mark_id, ordinal) deferrable initially deferred,
      constraint mark_photos_whole_region_check check (num_nulls(region_left, region_top, region_width, region_height) in (0, 4)),
      constraint mark_photos_region_inside_check check (
        coalesce(region_left + region_width <= 1.000001 and region_top + region_height <= 1.000001, true)
      )
    );

    create index mark_photos_photo on mark_photos (photo_id);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table mark_photos, part_photos;
    alter table parts
      drop column called, drop column found_model_id, drop column found_serial, drop column condition, drop column note,
      drop column revision, drop column recorded_at;
  `);
}
