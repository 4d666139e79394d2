import type { Knex } from 'knex';

/** Runs of serial numbers, who says when they were built, and single machines whose date is known. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table series (
      id uuid primary key,
      kind text not null generated always as ('series') stored,
      model_id uuid not null,
      maker_id uuid not null,
      prefix text not null check (prefix ~ '^[A-Z0-9]{0,8}$'),
      works_id uuid,
      label label,
      note prose,
      foreign key (id, kind) references facts (id, kind) on delete restrict,
      foreign key (model_id, maker_id) references models (id, maker_id) on update cascade on delete restrict,
      foreign key (works_id, maker_id) references works (id, maker_id) on update cascade on delete restrict,
      unique (id, model_id),
      constraint series_key unique nulls not distinct (model_id, prefix, works_id, label)
    );

    create index series_model on series (model_id, maker_id);
    create index series_works on series (works_id, maker_id);
    create index series_prefix on series (prefix);

    create table accounts (
      id uuid primary key,
      slug slug not null unique,
      title label not null,
      source_id uuid not null references sources on delete restrict
    );

    create index accounts_source on accounts (source_id);

    create table series_accounts (
      series_id uuid not null references series on delete restrict,
      account_id uuid not null references accounts on delete restrict,
      preferred boolean not null,
      primary key (series_id, account_id)
    );

    create index series_accounts_account on series_accounts (account_id);
    create unique index series_accounts_one_preferred on series_accounts (series_id) where preferred;

    create table serial_ranges (
      id uuid primary key,
      kind text not null generated always as ('serial-range') stored,
      slug slug not null unique,
      series_id uuid not null,
      account_id uuid not null,
      numbers number_span not null,
      built day_span not null,
      precision date_precision not null,
      standing text not null check (standing in ('solid', 'interpolated', 'conjectural')),
      in_order boolean not null,
      meaning date_meaning not null,
      note prose,
      foreign key (id, kind) references facts (id, kind) on delete restrict,
      foreign key (series_id, account_id) references series_accounts on delete restrict,
      constraint serial_ranges_precision_check check (span_has_precision(built, precision)),
      constraint serial_ranges_no_overlap
        exclude using gist (series_id with =, account_id with =, meaning with =, numbers with &&)
    );

    create index serial_ranges_series_account on serial_ranges (series_id, account_id);

    create table anchors (
      id uuid primary key,
      kind text not null generated always as ('anchor') stored,
      series_id uuid not null references series on delete restrict,
      number bigint not null check (number >= 0),
      built day_span not null,
      precision date_precision not null,
      meaning date_meaning not null,
      note prose,
      foreign key (id, kind) references facts (id, kind) on delete restrict,
      constraint anchors_precision_check check (span_has_precision(built, precision)),
      unique (series_id, number, meaning)
    );
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`drop table anchors, serial_ranges, series_accounts, accounts, series;`);
}
