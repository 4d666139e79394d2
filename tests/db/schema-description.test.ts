import { readFile } from 'node:fs/promises';
import { expect, test } from 'vitest';
import { describeSchema, SCHEMA_DESCRIPTION } from '#db/schema/describe-schema.ts';
import { useDatabase } from '#tests/support/database.ts';

const database = useDatabase();

test('the description on file is of the live schema', async () => {
  expect(await describeSchema(database.knex)).toBe(await readFile(SCHEMA_DESCRIPTION, 'utf8'));
});

test.each<[string, string, string]>([
  ['a column', 'alter table works add column roof label', 'roof: label, may be null'],
  [
    'a check',
    'alter table works add constraint works_place_check check (place is not null)',
    'works_place_check: CHECK (place IS NOT NULL)',
  ],
  ['an index', 'create index works_place on works (place)', 'INDEX works_place ON public.works USING btree (place)'],
  ['a view', 'create view lone_works as select id from works', 'view lone_works'],
  ['a value type', 'create domain colour as text', 'colour: text'],
  ['a function', 'create function one() returns int language sql return 1', ' FUNCTION public.one()'],
  [
    'a trigger',
    'create trigger works_change before update on works for each row execute function suppress_redundant_updates_trigger()',
    'TRIGGER works_change',
  ],
])('%s more shows', async (_, change, words) => {
  expect(await describeSchema(database.knex)).not.toContain(words);
  await database.knex.raw(change);
  expect(await describeSchema(database.knex)).toContain(words);
});
