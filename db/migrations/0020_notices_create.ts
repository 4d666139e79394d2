import type { Knex } from 'knex';

/** What members are told inside the register, and which kinds of it they want by e-mail too. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create domain notice_kind as text
      check (value in ('account', 'role', 'contribution', 'recomputed', 'reading', 'handover', 'message'));

    create table notices (
      id uuid primary key,
      member_id uuid not null references members on delete restrict,
      kind notice_kind not null,
      title label not null,
      body prose not null,
      -- An address of this site: one slash, so that no other host can be meant.
      href text check (href ~ '^/([^/[:cntrl:][:space:]\\\\][^[:cntrl:][:space:]\\\\]*){0,1}$' and char_length(href) <= 500),
      at timestamptz not null default now() check (isfinite(at)),
      read_at timestamptz check (isfinite(read_at))
    );

    create index notices_newest on notices (member_id, at desc, id desc);
    create index notices_unread on notices (member_id) where read_at is null;

    -- Only what a member chose; the rest is as the register has it.
    create table notice_choices (
      member_id uuid not null references members on delete restrict,
      kind notice_kind not null,
      by_email boolean not null,
      primary key (member_id, kind)
    );
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table notice_choices, notices;
    drop domain notice_kind;
  `);
}
