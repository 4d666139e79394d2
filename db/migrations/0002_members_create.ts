import type { Knex } from 'knex';

/** Whoever enters a fact has a name. How members sign in is no concern of this table. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table members (
      id uuid primary key,
      display_name label not null
    );
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`drop table members;`);
}
