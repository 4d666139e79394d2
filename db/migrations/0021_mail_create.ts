import type { Knex } from 'knex';

/** Every letter the register writes, with how it fared. What it says is kept only until it is sent: links in it are secrets. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table mail_messages (
      id uuid primary key,
      member_id uuid references members on delete restrict,
      to_address text check (to_address <> '' and char_length(to_address) <= 254 and to_address !~ '[[:cntrl:][:space:],;<>"]'),
      template text not null check (template ~ '^[a-z]+(-[a-z]+)*$' and char_length(template) <= 60),
      data jsonb check (jsonb_typeof(data) = 'object'),
      notice_kind notice_kind,
      -- SHA-256 of the secret in the letter's own link to unsubscribe.
      unsubscribe_hash bytea unique check (octet_length(unsubscribe_hash) = 32),
      state text not null default 'queued' check (state in ('queued', 'sent', 'failed')),
      attempts integer not null default 0 check (attempts >= 0),
      last_error text check (last_error <> '' and char_length(last_error) <= 200),
      queued_at timestamptz not null default now() check (isfinite(queued_at)),
      last_attempt_at timestamptz check (isfinite(last_attempt_at)),
      -- One attempt at a time: until then nobody else tries.
      leased_until timestamptz check (isfinite(leased_until)),
      settled_at timestamptz check (isfinite(settled_at)),

      constraint mail_messages_queued_check check ((state = 'queued') = (data is not null) and (state <> 'queued' or to_address is not null)),
      constraint mail_messages_settled_check check ((state = 'queued') = (settled_at is null)),
      constraint mail_messages_tried_check check ((attempts = 0) = (last_attempt_at is null)),
      constraint mail_messages_notice_check check (
        (unsubscribe_hash is null) = (notice_kind is null) and (unsubscribe_hash is null or member_id is not null)
      )
    );

    create index mail_messages_member on mail_messages (member_id);
    create index mail_messages_failed on mail_messages (settled_at) where state = 'failed';
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`drop table mail_messages;`);
}
