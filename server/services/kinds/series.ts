import { MachineModel } from '#db/models/machine-model.ts';
import { SeriesAccount } from '#db/models/series-account.ts';
import { Series } from '#db/models/series.ts';
import { nameOf, titleOf } from '../facts/name-of.ts';
import type { KindModule } from './kind-module.ts';
import { seriesEvidence } from './series-evidence.ts';
import { removeRow, writeRow } from './write-row.ts';

export const series: KindModule<'series'> = {
  kind: 'series',
  belongsBy: 'modelId',
  titleOf: async ({ modelId, prefix, label }, knex) =>
    [await titleOf(modelId, knex), prefix, label].filter((part) => part !== null && part !== '').join(' '),
  makerOf: async ({ modelId }, knex) => (await nameOf(modelId, knex))?.makerId ?? null,
  write: async (payload, writing, trx) => {
    const { makerId } = await MachineModel.query(trx).findById(payload.modelId).throwIfNotFound();
    await writeRow(Series, writing, { ...payload, makerId }, trx);
    return null;
  },
  refusals: {
    series_key: { path: ['prefix'], message: 'The model has this series; tell the two apart by works or by run' },
    series_works_id_maker_id_fkey: { path: ['worksId'], message: 'Works of another maker than the model’s' },
    fitments_position_id_model_id_part_type_id_fkey: { path: ['modelId'], message: 'Fitments are told of it on the model it had' },
  },
  remove: async (factId, trx) => {
    // That accounts speak of it goes with it; what they say are facts of their own, and stop it.
    await SeriesAccount.query(trx).delete().where({ seriesId: factId });
    await removeRow(Series, factId, trx);
  },
  gather: seriesEvidence,
  restsOn: ({ modelId }) => Promise.resolve({ makers: [], models: [modelId] }),
};
