import type { Knex } from 'knex';

/** How parts fit where they are, and the jobs that work out again what rests on a fact: how far each came, and what came out otherwise. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table part_fits (
      fitting_id uuid primary key references part_fittings on delete cascade,
      -- By its dates; null where the part is undated or nobody knows when the machine was built.
      verdict text check (verdict in ('in-step', 'possible', 'older-stock', 'cast-after-build', 'unsettled')),
      late double precision check (late between 0 and 1),
      in_lead double precision check (in_lead between 0 and 1),
      early double precision check (early between 0 and 1),
      -- The mark the dates are from, and when the machine was built.
      mark_id uuid references marks on delete set null,
      built day_span,
      -- By the catalogue's fitments; null: not in catalogue.
      type_verdict text check (type_verdict in ('as-built', 'later-fits', 'earlier-fits', 'does-not-belong')),
      constraint part_fits_figures_check check (num_nulls(verdict, late, in_lead, early) in (0, 4))
    );

    create index part_fits_mark on part_fits (mark_id);

    create table reworks (
      id uuid primary key,
      fact_id uuid not null,
      kind text not null,
      -- The version that came into force; null: the fact was retired.
      version integer check (version >= 1),
      -- Parts of these makers and foundries, and parts on machines of these models, rest on it.
      makers uuid[] not null,
      models uuid[] not null,
      state text not null default 'waiting' check (state in ('waiting', 'running', 'done', 'failed')),
      started_at timestamptz not null default now() check (isfinite(started_at)),
      finished_at timestamptz check (isfinite(finished_at)),
      -- The last part that was done; they go by id.
      reached uuid,
      done integer not null default 0 check (done >= 0),
      total integer check (total >= 0),
      changed integer not null default 0 check (changed >= 0),
      foreign key (fact_id, kind) references facts (id, kind) on delete restrict,
      constraint reworks_rests_check check (cardinality(makers) + cardinality(models) > 0),
      constraint reworks_finished_check check ((finished_at is not null) = (state = 'done'))
    );

    create index reworks_fact on reworks (fact_id, kind);
    create index reworks_newest on reworks (started_at desc, id desc);
    create index reworks_unfinished on reworks (id) where state <> 'done';

    -- Machines on which something came out otherwise, to tell their owners once it is over.
    create table rework_machines (
      rework_id uuid not null references reworks on delete cascade,
      machine_id uuid not null references machines on delete cascade,
      castings integer not null default 0 check (castings >= 0),
      dates integer not null default 0 check (dates >= 0),
      fits integer not null default 0 check (fits >= 0),
      primary key (rework_id, machine_id),
      constraint rework_machines_changed_check check (castings + dates + fits > 0)
    );

    create index rework_machines_machine on rework_machines (machine_id);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`drop table rework_machines, reworks, part_fits;`);
}
