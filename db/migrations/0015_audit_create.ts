import type { Knex } from 'knex';

/**
 * What was done, by whom, to what. Rows are only ever added. They name people by id alone, so that a member who goes takes their name
 * along and leaves the trail whole.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table audit_rows (
      id uuid primary key,
      -- The moment itself and not that of the transaction's begin, so that acts of one transaction stay in their order.
      at timestamptz not null default clock_timestamp() check (isfinite(at)),
      act text not null check (act ~ '^[a-z]+(-[a-z]+)*[.][a-z]+(-[a-z]+)*$'),
      -- Null: nobody was signed in, or it was done at the server.
      actor_id uuid references members on delete restrict,
      subject_kind text check (subject_kind ~ '^[a-z]+(-[a-z]+)*$'),
      subject_id uuid,
      detail jsonb not null check (jsonb_typeof(detail) = 'object'),
      request_id text check (request_id <> '' and char_length(request_id) <= 64),
      constraint audit_rows_subject_check check ((subject_kind is null) = (subject_id is null))
    );

    create index audit_rows_at on audit_rows (at, id);
    create index audit_rows_actor on audit_rows (actor_id, at);
    create index audit_rows_subject on audit_rows (subject_id, at);
    create index audit_rows_act on audit_rows (act, at);

    create function audit_rows_refuse_change() returns trigger language plpgsql as $$
    begin
      raise exception 'the audit trail only grows'
        using errcode = 'restrict_violation', table = tg_table_name;
    end
    $$;

    create trigger audit_rows_only_grow before update or delete or truncate on audit_rows
      for each statement execute function audit_rows_refuse_change();
    -- Also where a session plays the replica, which skips ordinary triggers.
    alter table audit_rows enable always trigger audit_rows_only_grow;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table audit_rows;
    drop function audit_rows_refuse_change();
  `);
}
