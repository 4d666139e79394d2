import type { Knex } from 'knex';
import { MachineModel } from '#db/models/machine-model.ts';
import { PartType } from '#db/models/part-type.ts';
import { Position } from '#db/models/position.ts';
import { WearLimit } from '#db/models/wear-limit.ts';
import { countsBy } from './counts-by.ts';
import { factRecords } from './fact-records.ts';
import type { FactRecords } from './fact-records.ts';
import type { CountedPartType } from './list-part-types.ts';

export type PartTypeOnRecord = CountedPartType & {
  readonly models: readonly MachineModel[];
  readonly wearLimits: readonly WearLimit[];
  readonly records: FactRecords;
};

/** @throws NotFoundError where no part type has the slug. */
export async function readPartType(slug: string, knex: Knex): Promise<PartTypeOnRecord> {
  const partType = await PartType.query(knex).findOne({ slug }).throwIfNotFound();
  const castings = await countsBy({ table: 'castings', owner: 'partTypeId' }, [partType.id], knex);
  const models = await MachineModel.query(knex)
    .whereIn('id', Position.query(knex).where({ partTypeId: partType.id }).select('modelId'))
    .orderBy(['name', 'id']);
  const wearLimits = await WearLimit.query(knex).where({ partTypeId: partType.id }).orderBy(['measure', 'id']).withGraphFetched('model');
  return {
    partType,
    castings: castings.get(partType.id) ?? 0,
    models,
    wearLimits,
    records: await factRecords([partType, ...wearLimits].map(({ id }) => id), knex),
  };
}
