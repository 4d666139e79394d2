import type { Knex } from 'knex';
import { Cipher } from '#db/models/cipher.ts';
import type { CipherVersion } from '#db/models/cipher-version.ts';
import { FactVersion } from '#db/models/fact-version.ts';
import { Source } from '#db/models/source.ts';

const TABLES = {
  maker: 'makers',
  model: 'models',
  'part-type': 'part_types',
  casting: 'castings',
  'serial-range': 'serial_ranges',
} as const;
export type HistoriedKind = keyof typeof TABLES;

/**
 * Every version of a fact, the newest first.
 *
 * @throws NotFoundError where nothing of the kind has the slug: a fact without a version there is not.
 */
export async function readHistory(kind: HistoriedKind, slug: string, knex: Knex): Promise<readonly FactVersion[]> {
  return FactVersion.query(knex)
    .whereIn('factId', knex(TABLES[kind]).where({ slug }).select('id'))
    .modify('newestFirst')
    .withGraphFetched('enteredBy')
    .throwIfNotFound();
}

/** The same for a cipher, whose versions hold a definition. */
export async function readCipherHistory(slug: string, knex: Knex): Promise<readonly CipherVersion[]> {
  const cipher = await Cipher.query(knex).findOne({ slug }).withGraphFetched('versions.enteredBy').throwIfNotFound();
  return cipher.versions ?? [];
}

/** A source is entered once and stays as it is; its history is that one entry. */
export async function readSourceEntry(slug: string, knex: Knex): Promise<Source> {
  return Source.query(knex).findOne({ slug }).withGraphFetched('[enteredBy, member]').throwIfNotFound();
}
