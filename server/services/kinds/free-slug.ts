import type { Knex } from 'knex';
import { z } from 'zod';
import { Maker } from '#db/models/maker.ts';

/** Room for `-999` within what the column holds. */
const LONGEST = 96;
const MARKS = /\p{M}+/gu;

/** A text as an address may have it: small letters, digits and single hyphens. */
function slugFrom(text: string): string {
  const plain = text.normalize('NFKD').replaceAll(MARKS, '').toLowerCase();
  const slug = plain.replaceAll(/[^a-z0-9]+/g, '-').slice(0, LONGEST).replaceAll(/^-+|-+$/g, '');
  return slug === '' ? 'entry' : slug;
}

/** The slug of a text, with `-2`, `-3` … where rows of the table have it already; `among` narrows which rows count. */
export async function freeSlug(
  { table, text, among = {} }: { readonly table: string; readonly text: string; readonly among?: Readonly<Record<string, string>> },
  trx: Knex.Transaction,
): Promise<string> {
  const slug = slugFrom(text);
  const rows: unknown = await trx(table).where(among).whereRaw(`slug ~ ('^' || ? || '(-[0-9]+){0,1}$')`, [slug]).select('slug');
  const taken = new Set(z.array(z.object({ slug: z.string() })).parse(rows).map((row) => row.slug));
  if (!taken.has(slug)) return slug;
  for (let place = 2; ; place += 1) {
    if (!taken.has(`${slug}-${place}`)) return `${slug}-${place}`;
  }
}

/** The first word of a maker's slug, which begins those of its models and castings. */
export async function makerWord(makerId: string, trx: Knex.Transaction): Promise<string> {
  const { slug } = await Maker.query(trx).findById(makerId).throwIfNotFound();
  return slug.split('-')[0] ?? slug;
}
