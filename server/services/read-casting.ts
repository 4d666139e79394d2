import type { Knex } from 'knex';
import { Casting } from '#db/models/casting.ts';
import { Cipher } from '#db/models/cipher.ts';
import { Fitment } from '#db/models/fitment.ts';
import { Supersession } from '#db/models/supersession.ts';
import type { OpenDays } from './built-between.ts';
import { builtBetween } from './built-between.ts';
import { factRecords } from './fact-records.ts';
import type { FactRecords } from './fact-records.ts';
import { serialRuns } from './serial-runs.ts';

export type PlacedFitment = {
  readonly fitment: Fitment;
  /** When the machines it speaks of were built, where the register knows. */
  readonly built: OpenDays | null;
};

export type CastingOnRecord = {
  readonly casting: Casting;
  readonly fitments: readonly PlacedFitment[];
  readonly follows: readonly Supersession[];
  readonly followedBy: readonly Supersession[];
  readonly ciphers: readonly Cipher[];
  readonly records: FactRecords;
};

/** @throws NotFoundError where no casting has the slug. */
export async function readCasting(slug: string, knex: Knex): Promise<CastingOnRecord> {
  const casting = await Casting.query(knex)
    .findOne({ slug })
    .withGraphFetched('[maker, pouredBy, partType, tells, partNumbers]')
    .throwIfNotFound();
  const fitments = await Fitment.query(knex)
    .where({ castingId: casting.id })
    .orderBy(['modelId', 'positionId', 'seriesId', 'numbers', 'id'])
    .withGraphFetched('[position.model, series]');
  const supersessions = await Supersession.query(knex)
    .where({ oldId: casting.id })
    .orWhere({ newId: casting.id })
    .withGraphFetched('[oldCasting, newCasting]');
  const runs = await serialRuns({ modelIds: [...new Set(fitments.map(({ modelId }) => modelId))] }, knex);
  return {
    casting,
    fitments: fitments.map((fitment) => ({ fitment, built: builtBetween(fitment, runs) })),
    follows: supersessions.filter(({ newId }) => newId === casting.id),
    followedBy: supersessions.filter(({ oldId }) => oldId === casting.id),
    ciphers: await ciphersOf(casting, knex),
    records: await factRecords([casting, ...fitments, ...supersessions].map(({ id }) => id), knex),
  };
}

/** The maker's own, and those of the foundry that poured it. A cipher known to be another foundry's cannot be on it. */
async function ciphersOf({ makerId, pouredById }: Casting, knex: Knex): Promise<readonly Cipher[]> {
  const query = Cipher.query(knex).orderBy(['title', 'id']);
  if (pouredById === null) return query.where({ makerId });
  return query
    .where({ makerId, foundryId: null })
    .orWhere({ makerId, foundryId: pouredById })
    .orWhere({ makerId: pouredById })
    .orWhere({ foundryId: pouredById });
}
