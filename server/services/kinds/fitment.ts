import { Fitment } from '#db/models/fitment.ts';
import { Position } from '#db/models/position.ts';
import { nameOf, titleOf } from '../facts/name-of.ts';
import { fitmentEvidence } from './fitment-evidence.ts';
import type { KindModule } from './kind-module.ts';
import { removeRow, writeRow } from './write-row.ts';

export const fitment: KindModule<'fitment'> = {
  kind: 'fitment',
  belongsBy: 'modelId',
  titleOf: async ({ castingId, positionId }, knex) => `${await titleOf(castingId, knex)} on ${await titleOf(positionId, knex)}`,
  makerOf: async ({ positionId }, knex) => (await nameOf(positionId, knex))?.makerId ?? null,
  write: async (payload, writing, trx) => {
    const { modelId, partTypeId } = await Position.query(trx).findById(payload.positionId).throwIfNotFound();
    await writeRow(Fitment, writing, { ...payload, modelId, partTypeId }, trx);
    return null;
  },
  refusals: {
    fitments_casting_id_part_type_id_fkey: { path: ['castingId'], message: 'A casting of another part type than the position’s' },
    fitments_series_id_model_id_fkey: { path: ['seriesId'], message: 'A series of another model than the position’s' },
    fitments_one_verdict: { path: ['numbers'], message: 'The catalogue says already what this casting is here, on some of these numbers' },
  },
  remove: (factId, trx) => removeRow(Fitment, factId, trx),
  gather: fitmentEvidence,
  restsOn: async ({ positionId }, knex) => {
    const modelId = (await nameOf(positionId, knex))?.modelId;
    return { makers: [], models: modelId ? [modelId] : [] };
  },
};
