import type { Knex } from 'knex';

/** That something is wrong with a fact, in somebody's words, and what became of it. With what is put forward it makes up the queue. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table flags (
      id uuid primary key,
      fact_id uuid not null references facts on delete restrict,
      -- What the fact was called, and whose moderators it went to; null: those of all makers.
      title label not null,
      maker_id uuid references makers on delete set null,
      by_id uuid not null references members on delete restrict,
      at timestamptz not null default now() check (isfinite(at)),
      reason prose not null,
      outcome text check (outcome in ('acted', 'kept')),
      settled_by_id uuid references members on delete restrict,
      settled_at timestamptz check (isfinite(settled_at)),
      settled_reason prose,
      constraint flags_settled_check check (num_nulls(outcome, settled_by_id, settled_at, settled_reason) in (0, 4)),
      constraint flags_not_ones_own_check check (settled_by_id is null or settled_by_id <> by_id)
    );

    create index flags_fact on flags (fact_id);
    create index flags_maker on flags (maker_id);
    create index flags_by on flags (by_id);
    create index flags_settled_by on flags (settled_by_id);
    create index flags_waiting on flags (at, id) where settled_at is null;
    -- Whoever flagged a fact waits for an answer before they flag it again.
    create unique index flags_one_waiting on flags (fact_id, by_id) where settled_at is null;

    create view moderation_queue as
      select id, 'contribution' as type, kind, maker_id, title, author_id as member_id, put_forward_at as at
        from contributions where state = 'put-forward'
      union all
      select flags.id, 'flag', facts.kind, maker_id, title, by_id, at
        from flags join facts on facts.id = flags.fact_id where settled_at is null;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop view moderation_queue;
    drop table flags;
  `);
}
