import type { Knex } from 'knex';
import { Cipher } from '#db/models/cipher.ts';
import { citedSources } from './fact-records.ts';
import type { FactRecord } from './fact-records.ts';

export type CipherOnRecord = { readonly cipher: Cipher; readonly record: FactRecord };

/** @throws NotFoundError where no cipher has the slug. */
export async function readCipher(slug: string, knex: Knex): Promise<CipherOnRecord> {
  const cipher = await Cipher.query(knex)
    .findOne({ slug })
    .withGraphFetched('[maker, foundry, versionInForce.enteredBy]')
    .throwIfNotFound();
  const sources = await citedSources([cipher.id], knex);
  const version = cipher.versionInForce;
  if (!version?.enteredBy) throw new RangeError('A cipher has no version in force');
  return {
    cipher,
    record: {
      version: { number: version.number, enteredAt: version.enteredAt, enteredBy: version.enteredBy.displayName },
      sources: sources.get(cipher.id) ?? [],
    },
  };
}
