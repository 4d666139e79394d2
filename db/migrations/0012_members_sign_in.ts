import type { Knex } from 'knex';

/**
 * How members sign in, what they may do, and when they no longer may. A member without an address has no account: somebody whose
 * contributions were entered for them, or a former member.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table members
      add column email text check (email ~ '^[^[:space:]@]+@[^[:space:]@]+$' and char_length(email) <= 254),
      add column email_verified_at timestamptz check (isfinite(email_verified_at)),
      add column password_hash text check (password_hash like '$argon2id$%' and char_length(password_hash) <= 200),
      add column role text not null default 'member' check (role in ('member', 'moderator', 'registrar')),
      -- What a moderator decides for: every maker, or those in member_scopes.
      add column scope text not null default 'none' check (scope in ('none', 'some', 'all')),
      add column joined_at timestamptz not null default now() check (isfinite(joined_at)),
      add column suspended_at timestamptz check (isfinite(suspended_at)),
      add column suspension_reason prose,
      add column suspended_by_id uuid references members on delete restrict,
      add column closed_at timestamptz check (isfinite(closed_at)),
      -- Signs in with a password that is printed for everybody, so never where strangers come.
      add column demo boolean not null default false,
      add column version integer not null default 1 check (version >= 1),
      add constraint members_sign_in_check check ((email is null) = (password_hash is null)),
      add constraint members_verified_check check (email_verified_at is null or email is not null),
      add constraint members_role_verified_check check (role = 'member' or email_verified_at is not null),
      add constraint members_scope_role_check check ((role = 'moderator') = (scope <> 'none')),
      add constraint members_suspension_check
        check (num_nulls(suspended_at, suspension_reason, suspended_by_id) in (0, 3) and coalesce(suspended_by_id <> id, true)),
      add constraint members_closed_check check (
        closed_at is null
        or (email is null and role = 'member' and suspended_at is null and not demo and display_name = 'a former member')
      ),
      add constraint members_id_scope_key unique (id, scope);

    create unique index members_email on members (lower(email));
    create index members_suspended_by on members (suspended_by_id);
    create index members_name on members (display_name);

    create table member_scopes (
      member_id uuid not null,
      -- Only a moderator of some makers has makers.
      scope text not null generated always as ('some') stored,
      maker_id uuid not null references makers on delete restrict,
      primary key (member_id, maker_id),
      foreign key (member_id, scope) references members (id, scope) on delete restrict
    );

    create index member_scopes_member_scope on member_scopes (member_id, scope);
    create index member_scopes_maker on member_scopes (maker_id);

    -- Whoever counts the registrars holds this until their transaction ends, so that two can't each be the other's reason to go.
    create function lock_registrars() returns void language sql
      return pg_advisory_xact_lock(hashtextextended('registrars', 0));

    create function members_keep_a_registrar() returns trigger language plpgsql as $$
    begin
      perform lock_registrars();
      if not exists (select from members where role = 'registrar' and suspended_at is null) then
        raise exception 'the last registrar stays one'
          using errcode = 'check_violation', constraint = 'members_last_registrar', table = 'members';
      end if;
      return null;
    end
    $$;

    create trigger members_keep_a_registrar_on_update after update of role, suspended_at on members
      for each row
      when (old.role = 'registrar' and old.suspended_at is null and (new.role <> 'registrar' or new.suspended_at is not null))
      execute function members_keep_a_registrar();
    create trigger members_keep_a_registrar_on_delete after delete on members
      for each row when (old.role = 'registrar' and old.suspended_at is null)
      execute function members_keep_a_registrar();
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop trigger members_keep_a_registrar_on_delete on members;
    drop trigger members_keep_a_registrar_on_update on members;
    drop function members_keep_a_registrar();
    drop function lock_registrars();
    drop table member_scopes;
    alter table members
      drop column email,
      drop column email_verified_at,
      drop column password_hash,
      drop column role,
      drop column scope,
      drop column joined_at,
      drop column suspended_at,
      drop column suspension_reason,
      drop column suspended_by_id,
      drop column closed_at,
      drop column demo,
      drop column version;
  `);
}
