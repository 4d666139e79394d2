import type { Knex } from 'knex';

/** What facts are from, and which fact, or which field of it, each source stands behind. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table sources (
      id uuid primary key,
      slug slug not null unique,
      kind text not null
        check (kind in ('book', 'drawing', 'plate', 'photo', 'sighting', 'correspondence', 'own-knowledge')),
      title label not null,
      author label,
      publisher label,
      year calendar_year,
      drawing_number label,
      sheet label,
      subject label,
      addressee label,
      dated date,
      member_id uuid references members on delete restrict,
      note prose,
      entered_by_id uuid not null references members on delete restrict,
      entered_at timestamptz not null check (isfinite(entered_at)),

      constraint sources_author_check check (author is null or kind in ('book', 'photo', 'correspondence')),
      constraint sources_publisher_check check (publisher is null or kind = 'book'),
      constraint sources_year_check check (year is null or kind in ('book', 'drawing', 'plate')),
      constraint sources_drawing_number_check check ((drawing_number is not null) = (kind = 'drawing')),
      constraint sources_sheet_check check (sheet is null or kind = 'drawing'),
      -- What the plate is on, what the photo shows, what was seen.
      constraint sources_subject_check check ((subject is not null) = (kind in ('plate', 'photo', 'sighting'))),
      constraint sources_addressee_check check (addressee is null or kind = 'correspondence'),
      constraint sources_dated_check check (
        case when dated is null then kind <> 'sighting'
             else isfinite(dated) and kind in ('photo', 'sighting', 'correspondence') end
      ),
      -- Whose knowledge it is, who saw it.
      constraint sources_member_check check (
        case when member_id is null then kind not in ('sighting', 'own-knowledge')
             else kind in ('sighting', 'own-knowledge') end
      )
    );

    create index sources_member on sources (member_id);
    create index sources_entered_by on sources (entered_by_id);

    create table fact_sources (
      id uuid primary key,
      fact_id uuid not null references facts on delete restrict,
      source_id uuid not null references sources on delete restrict,
      -- Null: behind the whole fact. Otherwise a field of its payload, or one entry of a list in it, counted from 1 (tells.2).
      field text check (field ~ '^[a-z][A-Za-z]*([.][1-9][0-9]*){0,1}$' and char_length(field) <= 60),
      locator label,
      note prose,
      constraint fact_sources_key unique nulls not distinct (fact_id, source_id, field, locator)
    );

    create index fact_sources_source on fact_sources (source_id);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`drop table fact_sources, sources;`);
}
