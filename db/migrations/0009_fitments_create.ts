import type { Knex } from 'knex';

/** Which casting belongs, or merely fits, at which position, by serial. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table fitments (
      id uuid primary key,
      kind text not null generated always as ('fitment') stored,
      casting_id uuid not null,
      position_id uuid not null,
      -- Carried along so that the position and the series are of one model, the casting and the position of one part type.
      model_id uuid not null,
      part_type_id uuid not null,
      -- Null: every series of the model, and then every number.
      series_id uuid,
      series_reach uuidrange not null generated always as (uuidrange(series_id, series_id, '[]')) stored,
      numbers whole_or_number_span not null,
      verdict text not null check (verdict in ('as-built', 'later-fits', 'earlier-fits', 'does-not-belong')),
      note prose,
      foreign key (id, kind) references facts (id, kind) on delete restrict,
      foreign key (casting_id, part_type_id) references castings (id, part_type_id) on update cascade on delete restrict,
      foreign key (position_id, model_id, part_type_id) references positions (id, model_id, part_type_id)
        on update cascade on delete restrict,
      foreign key (series_id, model_id) references series (id, model_id) on update cascade on delete restrict,
      constraint fitments_numbers_need_series_check
        check (series_id is not null or (lower_inf(numbers) and upper_inf(numbers))),
      constraint fitments_one_verdict
        exclude using gist (casting_id with =, position_id with =, series_reach with &&, numbers with &&)
    );

    create index fitments_casting on fitments (casting_id, part_type_id);
    create index fitments_position on fitments (position_id, model_id, part_type_id);
    create index fitments_series on fitments (series_id, model_id);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`drop table fitments;`);
}
