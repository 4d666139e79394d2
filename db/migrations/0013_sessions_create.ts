import type { Knex } from 'knex';

/**
 * Who is signed in where, the links sent by e-mail, and attempts that failed. Of every secret only its SHA-256 is kept, so that a copy of
 * these tables signs nobody in. How long a session lives depends on the role and is worked out from when it began and was last seen.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create domain secret_hash as text check (value ~ '^[0-9a-f]{64}$');

    create table sessions (
      id secret_hash primary key,
      -- What a list of sessions calls it: of no use as a cookie.
      public_id uuid not null unique,
      member_id uuid not null references members on delete cascade,
      -- 'owed': the password was right and a second factor is still to come; nobody is signed in yet.
      stage text not null check (stage in ('owed', 'open')),
      strength text not null check (strength in ('password', 'second-factor')),
      device label not null,
      started_at timestamptz not null default now() check (isfinite(started_at)),
      last_seen_at timestamptz not null default now() check (isfinite(last_seen_at)),
      -- When the member last proved who they are.
      confirmed_at timestamptz not null default now() check (isfinite(confirmed_at)),
      constraint sessions_owed_check check (stage = 'open' or strength = 'password'),
      constraint sessions_order_check check (last_seen_at >= started_at and confirmed_at >= started_at)
    );

    create index sessions_member on sessions (member_id);

    create table link_tokens (
      hash secret_hash primary key,
      member_id uuid not null references members on delete cascade,
      purpose text not null check (purpose in ('verify', 'reset', 'change-email')),
      -- The address an account is to have.
      email text check (email ~ '^[^[:space:]@]+@[^[:space:]@]+$' and char_length(email) <= 254),
      expires_at timestamptz not null check (isfinite(expires_at)),
      constraint link_tokens_address_check check ((purpose = 'change-email') = (email is not null)),
      -- A new link takes the place of the old.
      unique (member_id, purpose)
    );

    create table attempts (
      id uuid primary key,
      kind text not null check (kind in ('password', 'second-factor', 'letter')),
      -- Of the address typed, known or not, or of the member.
      account secret_hash not null,
      network cidr not null,
      at timestamptz not null default now() check (isfinite(at))
    );

    create index attempts_account on attempts (kind, account, at);
    create index attempts_network on attempts (kind, network, at);
    create index attempts_at on attempts (at);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table attempts, link_tokens, sessions;
    drop domain secret_hash;
  `);
}
