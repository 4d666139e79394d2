import type { Knex } from 'knex';

/** Marks on parts and machines, what members read there, and what date marks were worked out to mean. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table marks (
      id uuid primary key,
      part_id uuid references parts on delete cascade,
      machine_id uuid references machines on delete cascade,
      kind text not null check (kind in ('casting-number', 'date-code', 'foundry-mark', 'serial', 'plate', 'other')),
      technique text not null check (technique in ('cast', 'stamped')),
      -- The register's reading, settled by the trigger below; null while nobody has read it.
      reading text,
      constraint marks_one_place_check check (num_nonnulls(part_id, machine_id) = 1),
      -- What is cast into iron is cast into one part of it.
      constraint marks_machine_check check (machine_id is null or kind in ('serial', 'plate', 'other'))
    );

    create index marks_part on marks (part_id);
    create index marks_machine on marks (machine_id);

    create table readings (
      id uuid primary key,
      mark_id uuid not null references marks on delete cascade,
      reader_id uuid not null references members on delete restrict,
      -- In the mark notation, written one way: capitals, breaks as hyphens.
      text text not null check (text <> '' and char_length(text) <= 1300),
      made_at timestamptz not null default now() check (isfinite(made_at))
    );

    create index readings_mark on readings (mark_id, reader_id, made_at);
    create index readings_reader on readings (reader_id);

    -- The text most members give, each by their latest reading; among texts as many give, the one given last.
    create function readings_settle_mark() returns trigger language plpgsql as $$
    declare
      read_mark uuid := coalesce(to_jsonb(new) ->> 'mark_id', to_jsonb(old) ->> 'mark_id');
    begin
      -- Two that read at once can't see each other: the second waits here, and then sees both.
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

    create table mark_decodings (
      mark_id uuid primary key references marks on delete cascade,
      -- Null: no cipher in force can make it.
      cipher_id uuid references facts on delete restrict,
      cipher_version integer check (cipher_version >= 1),
      status text not null check (status in ('dated', 'several', 'none')),
      -- How many dates it can be; the likeliest of them are listed, each with first and last day and share.
      total integer not null check (total >= 0),
      candidates jsonb not null check (jsonb_typeof(candidates) = 'array'),
      constraint mark_decodings_both_cipher_check check (num_nulls(cipher_id, cipher_version) in (0, 2)),
      constraint mark_decodings_status_total_check check (
        case status when 'none' then total = 0 and cipher_id is null
                    when 'dated' then total = 1 and cipher_id is not null
                    else total > 1 and cipher_id is not null end
      ),
      constraint mark_decodings_some_candidates_check check (jsonb_array_length(candidates) <= total and (total = 0 or candidates <> '[]'))
    );

    create index mark_decodings_cipher on mark_decodings (cipher_id);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table mark_decodings, readings, marks;
    drop function readings_settle_mark();
  `);
}
