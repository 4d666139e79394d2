import type { Knex } from 'knex';

/**
 * A version tells all there is to it: what it said, on which sources, through which contribution it came, who decided and which older
 * one it brought back. A payload holds what its kind's form asks for, with the slug where there is one, and nothing that follows from it.
 */
export async function up(knex: Knex): Promise<void> {
  for (const table of ['fact_versions', 'cipher_versions']) {
    await knex.raw(
      `alter table ??
         -- For lists that hold versions of many facts.
         add column id uuid not null default gen_random_uuid() unique,
         add column citations jsonb not null default '[]' check (jsonb_typeof(citations) = 'array'),
         add column contribution_id uuid references contributions on delete restrict,
         add column decided_by_id uuid references members on delete restrict,
         add column brought_back integer,
         add constraint ?? check (brought_back is null or (brought_back >= 1 and brought_back < number)),
         add constraint ?? check (decided_by_id is null or decided_by_id <> entered_by_id)`,
      [table, `${table}_brought_back_check`, `${table}_not_ones_own_check`],
    );
    await knex.raw(`create unique index ?? on ?? (contribution_id)`, [`${table}_contribution`, table]);
    await knex.raw(`create index ?? on ?? (decided_by_id)`, [`${table}_decided_by`, table]);
  }
  await knex.raw(`
    alter table cipher_versions
      add column header jsonb not null default '{}' check (jsonb_typeof(header) = 'object');

    -- What was entered so far is given what it lacks; from then on a version is kept as it was entered again.
    alter table fact_versions disable trigger user;
    alter table cipher_versions disable trigger user;

    update fact_versions set payload = case kind
      when 'fitment' then payload - 'modelId' - 'partTypeId'
      when 'supersession' then payload - 'partTypeId'
      when 'series' then payload - 'makerId' - 'accounts'
      when 'casting' then payload || jsonb_build_object(
        'tells', (select coalesce(jsonb_agg(one - 'ordinal' order by place), '[]')
                    from jsonb_array_elements(payload -> 'tells') with ordinality as told (one, place)),
        'partNumbers', (select coalesce(jsonb_agg(one - 'ordinal' order by place), '[]')
                          from jsonb_array_elements(payload -> 'partNumbers') with ordinality as told (one, place)))
      else payload
    end;

    update fact_versions v set citations = cited.list from (
      select fact_id, jsonb_agg(jsonb_build_object('sourceId', source_id, 'field', field, 'locator', locator, 'note', note) order by id) as list
        from fact_sources group by fact_id
    ) cited where cited.fact_id = v.fact_id;

    update cipher_versions v set
      header = jsonb_build_object(
        'slug', c.slug, 'makerId', c.maker_id, 'foundryId', c.foundry_id, 'title', c.title, 'machineKind', c.machine_kind, 'note', c.note),
      citations = (
        select coalesce(
                 jsonb_agg(jsonb_build_object('sourceId', source_id, 'field', field, 'locator', locator, 'note', note) order by id), '[]')
          from fact_sources where fact_id = c.id)
      from ciphers c where c.id = v.cipher_id;

    alter table cipher_versions enable trigger user;
    alter table fact_versions enable trigger user;

    alter table fact_versions alter column citations drop default;
    alter table cipher_versions alter column citations drop default, alter column header drop default;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table cipher_versions drop column id, drop column header, drop column citations, drop column contribution_id,
      drop column decided_by_id, drop column brought_back;
    alter table fact_versions drop column id, drop column citations, drop column contribution_id, drop column decided_by_id, drop column brought_back;
  `);
}
