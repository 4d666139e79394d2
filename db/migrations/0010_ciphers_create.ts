import type { Knex } from 'knex';

/** Ciphers, of a maker and, where known, of the foundry that poured for it. What a cipher says is in its versions. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table ciphers (
      id uuid primary key,
      kind text not null generated always as ('cipher') stored,
      maker_id uuid not null references makers on delete restrict,
      foundry_id uuid,
      foundry_pours_iron boolean generated always as (case when foundry_id is not null then true end) stored,
      slug slug not null unique,
      title label not null,
      machine_kind machine_kind,
      note prose,
      foreign key (id, kind) references facts (id, kind) on delete restrict,
      foreign key (foundry_id, foundry_pours_iron) references makers (id, pours_iron) on delete restrict,
      constraint ciphers_key unique nulls not distinct (maker_id, foundry_id, title)
    );

    create index ciphers_foundry on ciphers (foundry_id, foundry_pours_iron);

    create table cipher_versions (
      cipher_id uuid not null references ciphers on delete restrict,
      number integer not null check (number >= 1),
      previous integer generated always as (nullif(number - 1, 0)) stored,
      definition jsonb not null check (
        jsonb_typeof(definition) = 'object'
        and coalesce(jsonb_typeof(definition -> 'fields') = 'array', false)
        and coalesce(jsonb_typeof(definition -> 'symbolSets') = 'object', false)
        and coalesce(jsonb_typeof(definition -> 'usedFrom') = 'string', false)
        and coalesce(jsonb_typeof(definition -> 'usedTo') in ('string', 'null'), false)
      ),
      -- The days in use stand in the definition; this is the same, for a search. No last day: still in use.
      used daterange not null generated always as (
        daterange(iso_day(definition ->> 'usedFrom'), iso_day(definition ->> 'usedTo'), '[]')
      ) stored,
      entered_by_id uuid not null references members on delete restrict,
      entered_at timestamptz not null check (isfinite(entered_at)),
      reason prose not null,
      superseded_at timestamptz,
      primary key (cipher_id, number),
      constraint cipher_versions_previous_fkey
        foreign key (cipher_id, previous) references cipher_versions (cipher_id, number) on delete restrict,
      constraint cipher_versions_superseded_check
        check (superseded_at is null or (isfinite(superseded_at) and superseded_at >= entered_at))
    );

    create unique index cipher_versions_one_in_force on cipher_versions (cipher_id) where superseded_at is null;
    create index cipher_versions_entered_by on cipher_versions (entered_by_id);
    create index cipher_versions_used on cipher_versions using gist (used) where superseded_at is null;

    create trigger cipher_versions_keep_history after update or delete on cipher_versions
      for each row execute function versions_keep_history();
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`drop table cipher_versions, ciphers;`);
}
