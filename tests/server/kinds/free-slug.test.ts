import { expect, test } from 'vitest';
import { freeSlug } from '#server/services/kinds/free-slug.ts';
import { addMaker } from '#tests/support/factories/catalogue.ts';
import { useDatabase } from '#tests/support/database.ts';

const database = useDatabase();

test.each([
  ['Ardle & Finch, Founders', 'ardle-finch-founders'],
  ['  Öster–Mühle №7  ', 'oster-muhle-no7'],
  ['--', 'entry'],
  ['鋳物', 'entry'],
  ['x'.repeat(300), 'x'.repeat(96)],
])('%s is as an address may have it', async (text, slug) => {
  expect(await freeSlug({ table: 'makers', text }, database.knex)).toBe(slug);
});

test('a slug that is taken is counted on, among the rows that count', async () => {
  await addMaker({ slug: 'ardle' }, database.knex);
  expect(await freeSlug({ table: 'makers', text: 'Ardle' }, database.knex)).toBe('ardle-2');
  await addMaker({ slug: 'ardle-2' }, database.knex);
  await addMaker({ slug: 'ardle-works' }, database.knex);
  await addMaker({ slug: 'ardle-9-b' }, database.knex);
  expect(await freeSlug({ table: 'makers', text: 'Ardle' }, database.knex)).toBe('ardle-3');
  expect(await freeSlug({ table: 'makers', text: 'Ardle', among: { place: 'Nether Wick' } }, database.knex)).toBe('ardle');
});
