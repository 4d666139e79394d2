import type { Knex } from 'knex';

/**
 * Creating requests that named a key, so that one that is sent again is answered as before and nothing is made twice. A key is written in the
 * transaction of what it stands for, and the answer after it: a key without an answer says that it was done and nobody knows how it was told.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table idempotency_keys (
      member_id uuid not null references members on delete cascade,
      key uuid not null,
      -- SHA-256 of method, address and body: a key stands for one request.
      request bytea not null check (octet_length(request) = 32),
      -- As text, for it is sent again as it was.
      answer text,
      at timestamptz not null default now() check (isfinite(at)),
      primary key (member_id, key)
    );

    create index idempotency_keys_at on idempotency_keys (at);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table idempotency_keys;');
}
