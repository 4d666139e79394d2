import type { Knex } from 'knex';
import type { CompiledCipher } from '#domain/ciphers/compiled-cipher.ts';
import { Cipher } from '#db/models/cipher.ts';
import { CipherVersion } from '#db/models/cipher-version.ts';
import type { CipherCache } from './cipher-cache.ts';

/** A cipher on record, as the version in force says. */
export type StoredCipher = {
  readonly id: string;
  readonly slug: string;
  readonly title: string;
  readonly makerId: string;
  /** The foundry whose castings for the maker carry it; `null`: not known to depend on the foundry. */
  readonly foundryId: string | null;
  readonly version: number;
  readonly compiled: CompiledCipher;
};

/** Which ciphers: one, those of a maker or of the foundry it is, those of several such, or all there are. */
export type CipherChoice = { readonly cipherId: string } | { readonly makerId: string } | { readonly makerIds: readonly string[] } | 'all';

/** The chosen ciphers in force, by title, those that compile. Definitions are fetched and compiled only where the cache lacks them. */
export async function storedCiphers(choice: CipherChoice, cache: CipherCache, knex: Knex): Promise<readonly StoredCipher[]> {
  const query = Cipher.query(knex).orderBy(['title', 'id']);
  if (choice !== 'all') {
    const makers = 'makerIds' in choice ? [...choice.makerIds] : 'makerId' in choice ? [choice.makerId] : [];
    if ('cipherId' in choice) void query.where({ id: choice.cipherId });
    else void query.whereIn('makerId', makers).orWhereIn('foundryId', makers);
  }
  const ciphers = await query;
  const versions = await CipherVersion.query(knex)
    .modify('inForce')
    .whereIn('cipherId', ciphers.map(({ id }) => id))
    .select('cipherId', 'number');
  const inForce = new Map(versions.map(({ cipherId, number }) => [cipherId, number]));
  const compiled = await compiledVersions(inForce, cache, knex);
  return ciphers.flatMap(({ id, slug, title, makerId, foundryId }) => {
    const version = inForce.get(id);
    const ready = compiled.get(id);
    return version === undefined || ready === undefined ? [] : [{ id, slug, title, makerId, foundryId, version, compiled: ready }];
  });
}

async function compiledVersions(
  versions: ReadonlyMap<string, number>,
  cache: CipherCache,
  knex: Knex,
): Promise<ReadonlyMap<string, CompiledCipher>> {
  const compiled = new Map<string, CompiledCipher>();
  const missing: [cipherId: string, version: number][] = [];
  for (const [cipherId, version] of versions) {
    const known = cache.get({ cipherId, version });
    if (known) compiled.set(cipherId, known);
    else if (known === undefined) missing.push([cipherId, version]);
  }
  if (missing.length === 0) return compiled;
  const rows = await CipherVersion.query(knex).whereInComposite(['cipherId', 'number'], missing);
  for (const { cipherId, number, definition } of rows) {
    const usable = cache.add({ cipherId, version: number }, definition);
    if (usable) compiled.set(cipherId, usable);
  }
  return compiled;
}
