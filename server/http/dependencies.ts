import type { Knex } from 'knex';
import type { Day } from '#domain/dates/day.ts';
import type { PhotoMeans } from '#server/files/photo-means.ts';
import type { CipherCache } from '#server/services/cipher-cache.ts';

/** What routes hand to services. */
export type ApiDependencies = {
  readonly knex: Knex;
  /** Today's calendar day, UTC. */
  readonly clock: () => Day;
  readonly ciphers: CipherCache;
  readonly photos: PhotoMeans;
  /** Whether the demo's accounts, whose passwords are printed, may be used. */
  readonly demoSignIns: boolean;
  /** Scheme, host and port that visitors use. */
  readonly publicOrigin: string;
  /** The folder of the local post, where letters may be read by anybody. */
  readonly localPostDirectory: string | undefined;
};
