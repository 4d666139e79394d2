import type { Knex } from 'knex';

/**
 * The value types every table is built from. A CHECK passes on NULL, so a column that must be filled says NOT NULL as well.
 * Ranges are stored `[)` by PostgreSQL whatever was written; what may be open is part of the type:
 * - `day_span` has both ends, `open_day_span` may lack one of them (not known), never both;
 * - `number_span` has a first number and may lack a last one (still open), `whole_or_number_span` may also be `(,)`: every number.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create extension if not exists btree_gist;
    create extension if not exists pg_trgm;

    create domain slug as text
      check (value ~ '^[a-z0-9]+(-[a-z0-9]+)*$' and char_length(value) <= 100);

    create domain label as text
      check (value <> '' and value = btrim(value) and char_length(value) <= 200);

    create domain prose as text
      check (value <> '' and value = btrim(value) and char_length(value) <= 4000);

    create domain calendar_year as smallint
      check (value between 1500 and 2199);

    create domain day_span as daterange
      check (not isempty(value) and not lower_inf(value) and not upper_inf(value)
             and isfinite(lower(value)) and isfinite(upper(value)));

    create domain open_day_span as daterange
      check (not isempty(value) and not (lower_inf(value) and upper_inf(value))
             and coalesce(isfinite(lower(value)), true) and coalesce(isfinite(upper(value)), true));

    create domain number_span as int8range
      check (not isempty(value) and not lower_inf(value) and lower(value) >= 0);

    create domain whole_or_number_span as int8range
      check (not isempty(value) and case when lower_inf(value) then upper_inf(value) else lower(value) >= 0 end);

    create domain machine_kind as text
      check (value in ('crawler-tractor', 'lathe', 'stationary-engine', 'barn-machine'));

    create domain date_meaning as text
      check (value in ('built', 'dispatched', 'sold', 'model-year'));

    create domain date_precision as text
      check (value in ('day', 'month', 'year'));

    -- "Every series" and "this series" as ranges of ids, so that one exclusion constraint can tell that they meet.
    create type uuidrange as range (subtype = uuid);

    -- The cast from text to date obeys a session setting; this one does not, so a generated column may use it.
    create function iso_day(day text) returns date
      language sql immutable strict parallel safe
      return make_date(split_part(day, '-', 1)::int, split_part(day, '-', 2)::int, split_part(day, '-', 3)::int);

    -- A span told to the month or the year begins and ends with one.
    create function span_has_precision(span daterange, told_to text) returns boolean
      language sql immutable parallel safe
      return case told_to
        when 'month' then extract(day from lower(span)) = 1 and extract(day from upper(span)) = 1
        when 'year' then extract(doy from lower(span)) = 1 and extract(doy from upper(span)) = 1
        else true
      end;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop function span_has_precision(daterange, text);
    drop function iso_day(text);
    drop type uuidrange;
    drop domain date_precision, date_meaning, machine_kind, whole_or_number_span, number_span, open_day_span, day_span,
      calendar_year, prose, label, slug;
  `);
}
