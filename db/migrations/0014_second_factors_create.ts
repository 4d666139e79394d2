import type { Knex } from 'knex';

/** What a member has besides a password. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table authenticators (
      member_id uuid primary key references members on delete cascade,
      secret text not null check (secret ~ '^[A-Z2-7]{32,64}$'),
      added_at timestamptz not null default now() check (isfinite(added_at)),
      -- Null until a first code has shown that the secret arrived.
      confirmed_at timestamptz check (isfinite(confirmed_at)),
      -- The time step of the last code taken; one not later is a replay (RFC 6238, 5.2).
      last_step bigint check (last_step >= 0),
      constraint authenticators_confirmed_check check ((confirmed_at is null) = (last_step is null))
    );

    create table recovery_codes (
      hash secret_hash primary key,
      member_id uuid not null references members on delete cascade,
      used_at timestamptz check (isfinite(used_at))
    );

    create index recovery_codes_member on recovery_codes (member_id);

    create table passkeys (
      id uuid primary key,
      member_id uuid not null references members on delete cascade,
      credential_id text not null unique check (credential_id ~ '^[A-Za-z0-9_-]+$' and char_length(credential_id) <= 1400),
      public_key bytea not null,
      counter bigint not null check (counter >= 0),
      transports text[] not null,
      name label not null,
      backed_up boolean not null,
      added_at timestamptz not null default now() check (isfinite(added_at)),
      last_used_at timestamptz check (isfinite(last_used_at))
    );

    create index passkeys_member on passkeys (member_id);

    create table webauthn_challenges (
      challenge text primary key check (challenge ~ '^[A-Za-z0-9_-]{22,}$'),
      member_id uuid references members on delete cascade,
      purpose text not null check (purpose in ('add', 'sign-in')),
      expires_at timestamptz not null check (isfinite(expires_at)),
      constraint webauthn_challenges_member_check check (purpose = 'sign-in' or member_id is not null)
    );

    create index webauthn_challenges_member on webauthn_challenges (member_id);
    create index webauthn_challenges_expires on webauthn_challenges (expires_at);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`drop table webauthn_challenges, passkeys, recovery_codes, authenticators;`);
}
