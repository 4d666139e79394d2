import type { Knex } from 'knex';

/**
 * What every fact is called, whatever its kind, with what it belongs to: the maker whose moderators decide about it, the model and the
 * part type. The slug is null where the kind has no page of its own.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create function casting_title(number text, pattern text) returns text
      language sql immutable parallel safe
      return number || coalesce(' (' || pattern || ')', '');

    create function series_title(model text, prefix text, label text) returns text
      language sql immutable parallel safe
      return concat_ws(' ', model, nullif(prefix, ''), label);

    create view fact_names (id, kind, slug, title, maker_id, model_id, part_type_id) as
      select id, 'maker', slug::text, name::text, id, null::uuid, null::uuid from makers
      union all
      select w.id, 'works', null, k.name || ', ' || w.name, k.id, null, null from works w join makers k on k.id = w.maker_id
      union all
      select id, 'model', slug::text, name::text, maker_id, id, null from models
      union all
      select id, 'part-type', slug::text, name::text, null, null, id from part_types
      union all
      select p.id, 'position', null, m.name || ', ' || p.name, m.maker_id, m.id, p.part_type_id
        from positions p join models m on m.id = p.model_id
      union all
      select id, 'casting', slug::text, casting_title(number, pattern), maker_id, null, part_type_id from castings
      union all
      select f.id, 'fitment', null, casting_title(c.number, c.pattern) || ' on ' || m.name || ', ' || p.name, m.maker_id, m.id, f.part_type_id
        from fitments f join castings c on c.id = f.casting_id join positions p on p.id = f.position_id join models m on m.id = f.model_id
      union all
      select s.id, 'supersession', null,
             casting_title(o.number, o.pattern) || ' followed by ' || casting_title(n.number, n.pattern), o.maker_id, null, s.part_type_id
        from supersessions s join castings o on o.id = s.old_id join castings n on n.id = s.new_id
      union all
      select s.id, 'series', null, series_title(m.name, s.prefix, s.label), s.maker_id, m.id, null
        from series s join models m on m.id = s.model_id
      union all
      select r.id, 'serial-range', r.slug::text,
             series_title(m.name, s.prefix, s.label) || ', ' || lower(r.numbers) || ' to ' || coalesce((upper(r.numbers) - 1)::text, 'the last'),
             s.maker_id, m.id, null
        from serial_ranges r join series s on s.id = r.series_id join models m on m.id = s.model_id
      union all
      select a.id, 'anchor', null, series_title(m.name, s.prefix, s.label) || ', ' || a.number, s.maker_id, m.id, null
        from anchors a join series s on s.id = a.series_id join models m on m.id = s.model_id
      union all
      select id, 'cipher', slug::text, title::text, maker_id, null, null from ciphers
      union all
      select w.id, 'wear-limit', null, t.name || coalesce(' on ' || m.name, '') || ', ' || w.measure, m.maker_id, w.model_id, w.part_type_id
        from wear_limits w join part_types t on t.id = w.part_type_id left join models m on m.id = w.model_id;

    -- The versions of facts of every kind in one list.
    create view entered_versions as
      select id, fact_id, kind, number, entered_by_id, entered_at, reason, superseded_at is null as in_force from fact_versions
      union all
      select id, cipher_id, kind, number, entered_by_id, entered_at, reason, superseded_at is null from cipher_versions;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop view entered_versions;
    drop view fact_names;
    drop function series_title(text, text, text);
    drop function casting_title(text, text);
  `);
}
