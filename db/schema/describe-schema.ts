import type { Knex } from 'knex';
import { writeFile } from 'node:fs/promises';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { connect } from '#db/connection.ts';

/** Where the description is kept, so that a change of the schema can be read as one. */
export const SCHEMA_DESCRIPTION = fileURLToPath(new URL('./schema.txt', import.meta.url));

/** What Knex keeps for itself. */
const KNEX_TABLES = ['migrations', 'migrations_lock'];

type Line = { readonly owner: string; readonly line: string };

/**
 * The live schema in words, from PostgreSQL's own catalogue: value types, tables with their columns, constraints, indexes and
 * triggers, views, and functions. Names are in alphabetical order, columns in their own. Run with the address of a migrated database,
 * this file writes the description it is compared with.
 */
export async function describeSchema(knex: Knex): Promise<string> {
  const tables = await tableNames(knex);
  const columns = await linesOf(knex, COLUMNS);
  const constraints = await linesOf(knex, CONSTRAINTS);
  const indexes = await linesOf(knex, INDEXES);
  const triggers = await linesOf(knex, TRIGGERS);
  const sections = [
    ...section('value types', ownedBy(await linesOf(knex, VALUE_TYPES), '')),
    ...tables.flatMap((table) => [
      ...section(`table ${table}`, ownedBy(columns, table)),
      ...subsection('constraints', ownedBy(constraints, table)),
      ...subsection('indexes', ownedBy(indexes, table)),
      ...subsection('triggers', ownedBy(triggers, table)),
    ]),
    ...(await linesOf(knex, VIEWS)).flatMap(({ owner, line }) => section(`view ${owner}`, line.trim().split('\n').map((one) => one.trim()))),
    ...section(
      'functions',
      (await linesOf(knex, FUNCTIONS)).flatMap(({ line }) => [...line.trim().split('\n'), '']),
    ),
  ];
  return `${sections.join('\n').trim()}\n`;
}

async function tableNames(knex: Knex): Promise<readonly string[]> {
  const rows = await knex<{ tablename: string }>('pg_tables')
    .where('schemaname', 'public')
    .whereNotIn('tablename', KNEX_TABLES)
    .orderBy('tablename')
    .select('tablename');
  return rows.map((row) => row.tablename);
}

async function linesOf(knex: Knex, query: string): Promise<readonly Line[]> {
  const { rows } = await knex.raw<{ rows: Line[] }>(query);
  return rows;
}

function ownedBy(lines: readonly Line[], owner: string): readonly string[] {
  return lines.filter((line) => line.owner === owner).map(({ line }) => line.replace(/\s+/g, ' '));
}

function section(title: string, lines: readonly string[]): readonly string[] {
  return ['', title, ...lines.map((line) => `  ${line}`.trimEnd())];
}

function subsection(title: string, lines: readonly string[]): readonly string[] {
  return lines.length === 0 ? [] : [`  ${title}`, ...lines.map((line) => `    ${line}`)];
}

/** Nothing that an extension brought. */
const OURS = `not exists (select from pg_depend d where d.objid = o.oid and d.deptype = 'e')`;

const COLUMNS = `
  select c.relname as owner,
         a.attname || ': ' || format_type(a.atttypid, a.atttypmod)
           || case when a.attnotnull then '' else ', may be null' end
           || case when a.attgenerated = 's' then ', always ' || pg_get_expr(d.adbin, d.adrelid)
                   when d.adbin is not null then ', at first ' || pg_get_expr(d.adbin, d.adrelid)
                   else '' end as line
    from pg_attribute a
    join pg_class c on c.oid = a.attrelid and c.relkind = 'r'
    join pg_namespace n on n.oid = c.relnamespace and n.nspname = 'public'
    left join pg_attrdef d on d.adrelid = a.attrelid and d.adnum = a.attnum
   where a.attnum > 0 and not a.attisdropped
   order by c.relname, a.attnum`;

const CONSTRAINTS = `
  select c.relname as owner, o.conname || ': ' || pg_get_constraintdef(o.oid, true) as line
    from pg_constraint o
    join pg_class c on c.oid = o.conrelid
    join pg_namespace n on n.oid = c.relnamespace and n.nspname = 'public'
   where o.contype <> 't'
   order by c.relname, array_position(array['p', 'u', 'f', 'c', 'x'], o.contype::text), o.conname`;

const INDEXES = `
  select c.relname as owner, regexp_replace(pg_get_indexdef(i.indexrelid), '^CREATE ', '') as line
    from pg_index i
    join pg_class c on c.oid = i.indrelid
    join pg_class o on o.oid = i.indexrelid
    join pg_namespace n on n.oid = c.relnamespace and n.nspname = 'public'
   where not exists (select from pg_constraint k where k.conindid = i.indexrelid and k.contype in ('p', 'u', 'x'))
   order by c.relname, o.relname`;

const TRIGGERS = `
  select c.relname as owner, regexp_replace(pg_get_triggerdef(t.oid, true), '^CREATE ', '') as line
    from pg_trigger t
    join pg_class c on c.oid = t.tgrelid
    join pg_namespace n on n.oid = c.relnamespace and n.nspname = 'public'
   where not t.tgisinternal
   order by c.relname, t.tgname`;

const VIEWS = `
  select viewname as owner, definition as line from pg_views where schemaname = 'public' order by viewname`;

const VALUE_TYPES = `
  select '' as owner,
         o.typname || ': ' || case o.typtype
           when 'd' then format_type(o.typbasetype, o.typtypmod) || coalesce((
             select string_agg(' ' || pg_get_constraintdef(k.oid, true), '' order by k.conname) from pg_constraint k where k.contypid = o.oid), '')
           else 'range of ' || (select format_type(r.rngsubtype, null) from pg_range r where r.rngtypid = o.oid) end as line
    from pg_type o
    join pg_namespace n on n.oid = o.typnamespace and n.nspname = 'public'
   where o.typtype in ('d', 'r') and ${OURS}
   order by o.typname`;

const FUNCTIONS = `
  select '' as owner, pg_get_functiondef(o.oid) as line
    from pg_proc o
    join pg_namespace n on n.oid = o.pronamespace and n.nspname = 'public'
   where ${OURS} and not exists (select from pg_depend d where d.objid = o.oid and d.deptype = 'i')
   order by o.proname`;

async function main(url: string | undefined): Promise<void> {
  if (url === undefined) throw new Error('say which migrated database to describe: describe-schema.ts <url>');
  const knex = connect(url, { poolSize: 1 });
  try {
    await writeFile(SCHEMA_DESCRIPTION, await describeSchema(knex));
  } finally {
    await knex.destroy();
  }
}

if (process.argv[1] !== undefined && import.meta.url === pathToFileURL(process.argv[1]).href) await main(process.argv[2]);
