import type { Knex } from 'knex';

/**
 * Photos. A picture is what its bytes are, whoever sends them, and is kept once; a photo is a member's own of it, with an address nobody can
 * guess. Files stand in the photo store under the picture's key: the original until the renditions are made, then these alone.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table pictures (
      id uuid primary key,
      -- SHA-256 of the bytes as they were sent.
      digest bytea not null unique check (octet_length(digest) = 32),
      store_key text not null unique check (store_key ~ '^[a-z0-9]{32}$'),
      type text not null check (type in ('jpeg', 'png', 'webp', 'heic')),
      -- Of the original.
      bytes bigint not null check (bytes > 0),
      -- Upright.
      width integer not null check (width > 0),
      height integer not null check (height > 0),
      state text not null default 'waiting' check (state in ('waiting', 'ready', 'failed')),
      failure text check (failure <> ''),
      sent_at timestamptz not null default now() check (isfinite(sent_at)),
      constraint pictures_failed_check check ((failure is not null) = (state = 'failed'))
    );

    create index pictures_unfinished on pictures (id) where state = 'waiting';

    create table picture_files (
      picture_id uuid not null references pictures on delete cascade,
      rendition text not null check (rendition in ('thumb', 'page', 'full', 'relief')),
      type text not null check (type in ('image/webp', 'image/avif')),
      width integer not null check (width > 0),
      height integer not null check (height > 0),
      bytes bigint not null check (bytes > 0),
      digest bytea not null check (octet_length(digest) = 32),
      primary key (picture_id, rendition, width, type)
    );

    create table photos (
      id uuid primary key,
      owner_id uuid not null references members on delete restrict,
      picture_id uuid not null references pictures on delete restrict,
      -- What its files are found under by whoever may see it.
      address text not null unique check (address ~ '^[a-z0-9]{32}$'),
      name text check (name <> '' and char_length(name) <= 120),
      -- By the camera, kept only where its owner said so.
      taken_on date check (isfinite(taken_on)),
      added_at timestamptz not null default now() check (isfinite(added_at)),
      unique (owner_id, picture_id)
    );

    create index photos_picture on photos (picture_id);
    create index photos_owner on photos (owner_id, added_at desc, id desc);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table photos, picture_files, pictures;');
}
