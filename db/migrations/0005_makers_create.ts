import type { Knex } from 'knex';

/** Makers, some of whom build machines and some of whom pour iron, and their works. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table makers (
      id uuid primary key,
      kind text not null generated always as ('maker') stored,
      slug slug not null unique,
      name label not null unique,
      builds_machines boolean not null,
      pours_iron boolean not null,
      foundry_mark label,
      place label,
      founded calendar_year,
      closed calendar_year,
      note prose,
      foreign key (id, kind) references facts (id, kind) on delete restrict,
      unique (id, builds_machines),
      unique (id, pours_iron),
      constraint makers_trade_check check (builds_machines or pours_iron),
      constraint makers_foundry_mark_check check (foundry_mark is null or pours_iron),
      constraint makers_years_check check (founded is null or closed is null or founded <= closed)
    );

    create table works (
      id uuid primary key,
      kind text not null generated always as ('works') stored,
      maker_id uuid not null references makers on delete restrict,
      slug slug not null,
      name label not null,
      place label,
      note prose,
      foreign key (id, kind) references facts (id, kind) on delete restrict,
      unique (maker_id, slug),
      unique (id, maker_id)
    );
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`drop table works, makers;`);
}
