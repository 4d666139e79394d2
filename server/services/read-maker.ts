import type { Knex } from 'knex';
import { z } from 'zod';
import { Cipher } from '#db/models/cipher.ts';
import { MachineModel } from '#db/models/machine-model.ts';
import { Maker } from '#db/models/maker.ts';
import { Works } from '#db/models/works.ts';
import { factRecords } from './fact-records.ts';
import type { FactRecords } from './fact-records.ts';
import { countsOfMakers } from './list-makers.ts';
import type { CountedMaker } from './list-makers.ts';

export type MakerOnRecord = CountedMaker & {
  readonly works: readonly Works[];
  readonly models: readonly MachineModel[];
  readonly ciphers: readonly Cipher[];
  /** Makers whose castings or ciphers name this one as the foundry. */
  readonly pouredFor: readonly Maker[];
  readonly records: FactRecords;
};

/** @throws NotFoundError where no maker has the slug. */
export async function readMaker(slug: string, knex: Knex): Promise<MakerOnRecord> {
  const maker = await Maker.query(knex).findOne({ slug }).throwIfNotFound();
  const works = await Works.query(knex).where({ makerId: maker.id }).orderBy('name');
  const models = await MachineModel.query(knex).where({ makerId: maker.id }).orderBy('name');
  const ciphers = await Cipher.query(knex)
    .where({ makerId: maker.id })
    .orWhere({ foundryId: maker.id })
    .orderBy('title')
    .withGraphFetched('[foundry, versionInForce]');
  const counts = await countsOfMakers([maker.id], knex);
  return {
    maker,
    counts: counts(maker.id),
    works,
    models,
    ciphers,
    pouredFor: await makersPouredFor(maker.id, knex),
    records: await factRecords([maker.id, ...works.map(({ id }) => id)], knex),
  };
}

async function makersPouredFor(foundryId: string, knex: Knex): Promise<readonly Maker[]> {
  const rows: unknown = await knex('castings')
    .where({ pouredById: foundryId })
    .select('makerId')
    .union(knex('ciphers').where({ foundryId }).select('makerId'));
  const ids = z.array(z.object({ makerId: z.string() })).parse(rows).map(({ makerId }) => makerId);
  return Maker.query(knex)
    .whereIn('id', ids.filter((id) => id !== foundryId))
    .orderBy('name');
}
