import type { Knex } from 'knex';

/** Machines on record: whose, which model, and the serial as it is stamped with what was read from it. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create domain visibility as text check (value in ('private', 'by-link', 'public'));

    create table machines (
      id uuid primary key,
      owner_id uuid not null references members on delete restrict,
      model_id uuid not null references models on delete restrict,
      serial_as_stamped text not null check (serial_as_stamped <> '' and char_length(serial_as_stamped) <= 40),
      prefix text not null check (prefix ~ '^[A-Z0-9]{0,40}$'),
      number bigint not null check (number >= 0),
      suffix text not null check (suffix ~ '^[A-Z]{0,40}$'),
      nickname label,
      visibility visibility not null default 'private',
      -- Whether others see the last digits.
      serial_shown boolean not null default false,
      unique (id, model_id)
    );

    create index machines_owner on machines (owner_id);
    create index machines_model_serial on machines (model_id, prefix, number);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table machines;
    drop domain visibility;
  `);
}
