import type { Knex } from 'knex';

/**
 * What members put forward, what is said and found out about it, and what became of it. Where a contribution stands is one column; the
 * rest of the row agrees with it, and a trigger lets it go only from one standing to the next.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table contributions (
      id uuid primary key,
      author_id uuid not null references members on delete restrict,
      kind text not null check (kind in (
        'maker', 'works', 'model', 'part-type', 'position', 'casting', 'fitment', 'supersession',
        'series', 'serial-range', 'anchor', 'cipher', 'wear-limit'
      )),
      -- The fact it changes, or has become; null: it would be a new one.
      subject_id uuid,
      -- The version it was begun on.
      base_version integer check (base_version >= 1),
      title label not null,
      -- Whose moderators decide; null: only those of all makers.
      maker_id uuid references makers on delete set null,
      state text not null check (state in ('drafted', 'put-forward', 'sent-back', 'entered', 'turned-down', 'withdrawn')),
      payload jsonb not null check (jsonb_typeof(payload) = 'object'),
      citations jsonb not null check (jsonb_typeof(citations) = 'array'),
      note prose,
      -- Grows with every change of what it says and with every putting forward.
      revision integer not null default 1 check (revision >= 1),
      started_at timestamptz not null default now() check (isfinite(started_at)),
      changed_at timestamptz not null default now() check (isfinite(changed_at)),
      put_forward_at timestamptz check (isfinite(put_forward_at)),
      decided_at timestamptz check (isfinite(decided_at)),
      decided_by_id uuid references members on delete restrict,
      entered_version integer check (entered_version >= 1),
      foreign key (subject_id, kind) references facts (id, kind) on delete restrict,
      constraint contributions_base_check check (
        case when subject_id is null then base_version is null
             else base_version is not null or state = 'entered' end
      ),
      constraint contributions_put_forward_check check ((put_forward_at is null) = (state = 'drafted')),
      constraint contributions_decided_check check (
        (decided_at is not null) = (state in ('sent-back', 'entered', 'turned-down'))
        and (decided_by_id is not null) = (state in ('sent-back', 'entered', 'turned-down'))
      ),
      constraint contributions_entered_check check (
        (entered_version is not null) = (state = 'entered')
        and (state <> 'entered' or subject_id is not null)
      ),
      constraint contributions_not_ones_own_check check (decided_by_id is null or decided_by_id <> author_id)
    );

    create index contributions_author on contributions (author_id, changed_at);
    create index contributions_subject on contributions (subject_id, kind);
    create index contributions_maker on contributions (maker_id);
    create index contributions_decided_by on contributions (decided_by_id);
    create index contributions_waiting on contributions (put_forward_at, id) where state = 'put-forward';

    create function contributions_check_step() returns trigger language plpgsql as $$
    begin
      if tg_op = 'DELETE' then
        if old.state <> 'drafted' then
          raise exception 'a contribution that was put forward is kept'
            using errcode = 'restrict_violation', table = 'contributions';
        end if;
        return old;
      end if;
      if new.state = old.state then
        if old.state not in ('drafted', 'sent-back')
           and (new.payload, new.citations, new.note, new.revision, new.author_id, new.kind)
               is distinct from (old.payload, old.citations, old.note, old.revision, old.author_id, old.kind) then
          raise exception 'what was put forward stays as it is until it is sent back'
            using errcode = 'restrict_violation', table = 'contributions';
        end if;
      elsif not (
        (old.state = 'drafted' and new.state = 'put-forward')
        or (old.state = 'put-forward' and new.state in ('sent-back', 'entered', 'turned-down', 'withdrawn'))
        or (old.state = 'sent-back' and new.state in ('put-forward', 'withdrawn'))
      ) then
        raise exception 'a contribution does not go from % to %', old.state, new.state
          using errcode = 'check_violation', constraint = 'contributions_step', table = 'contributions';
      end if;
      return new;
    end
    $$;

    create trigger contributions_step before update or delete on contributions
      for each row execute function contributions_check_step();

    create table contribution_comments (
      id uuid primary key,
      contribution_id uuid not null references contributions on delete restrict,
      author_id uuid not null references members on delete restrict,
      at timestamptz not null default clock_timestamp() check (isfinite(at)),
      -- The field it is about, from the payload inwards; null: the whole.
      path text check (path <> '' and char_length(path) <= 120),
      text prose not null
    );

    create index contribution_comments_contribution on contribution_comments (contribution_id, at);
    create index contribution_comments_author on contribution_comments (author_id);

    create table contribution_decisions (
      id uuid primary key,
      contribution_id uuid not null references contributions on delete restrict,
      -- What was decided on is decided once.
      revision integer not null check (revision >= 1),
      decision text not null check (decision in ('enter', 'send-back', 'turn-down')),
      reason prose not null,
      by_id uuid not null references members on delete restrict,
      at timestamptz not null default clock_timestamp() check (isfinite(at)),
      unique (contribution_id, revision)
    );

    create index contribution_decisions_by on contribution_decisions (by_id);

    create table contribution_evidence (
      id uuid primary key,
      contribution_id uuid not null references contributions on delete restrict,
      revision integer not null check (revision >= 1),
      occasion text not null check (occasion in ('put-forward', 'opened')),
      gathered_at timestamptz not null default clock_timestamp() check (isfinite(gathered_at)),
      findings jsonb not null check (
        jsonb_typeof(findings) = 'object'
        and coalesce(jsonb_typeof(findings -> 'groups') = 'array', false)
        and coalesce(jsonb_typeof(findings -> 'figures') = 'array', false)
      )
    );

    create index contribution_evidence_contribution on contribution_evidence (contribution_id, gathered_at);

    -- Who has it open: told to the other moderators for a minute.
    create table contribution_openings (
      contribution_id uuid not null references contributions on delete cascade,
      member_id uuid not null references members on delete cascade,
      seen_at timestamptz not null check (isfinite(seen_at)),
      primary key (contribution_id, member_id)
    );

    create index contribution_openings_member on contribution_openings (member_id);

    create function rows_only_grow() returns trigger language plpgsql as $$
    begin
      raise exception 'rows of % are kept as they were written', tg_table_name
        using errcode = 'restrict_violation', table = tg_table_name;
    end
    $$;

    create trigger contribution_comments_only_grow before update or delete on contribution_comments
      for each row execute function rows_only_grow();
    create trigger contribution_decisions_only_grow before update or delete on contribution_decisions
      for each row execute function rows_only_grow();
    create trigger contribution_evidence_only_grow before update or delete on contribution_evidence
      for each row execute function rows_only_grow();
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table contribution_openings, contribution_evidence, contribution_decisions, contribution_comments, contributions;
    drop function rows_only_grow();
    drop function contributions_check_step();
  `);
}
