import { Position } from '#db/models/position.ts';
import { nameOf, titleOf } from '../facts/name-of.ts';
import { freeSlug } from './free-slug.ts';
import type { KindModule } from './kind-module.ts';
import { positionEvidence } from './position-evidence.ts';
import { removeRow, writeRow } from './write-row.ts';

export const position: KindModule<'position'> = {
  kind: 'position',
  belongsBy: 'modelId',
  titleOf: async ({ modelId, name }, knex) => `${await titleOf(modelId, knex)}, ${name}`,
  makerOf: async ({ modelId }, knex) => (await nameOf(modelId, knex))?.makerId ?? null,
  write: async (payload, writing, trx) => {
    const slug = writing.slug ?? (await freeSlug({ table: 'positions', text: payload.name, among: { modelId: payload.modelId } }, trx));
    await writeRow(Position, writing, { ...payload, slug }, trx);
    return slug;
  },
  refusals: {
    positions_model_id_name_key: { path: ['name'], message: 'The model has another position called so' },
    positions_model_id_slug_key: { path: ['name'], message: 'The model has another position called so' },
    positions_model_id_ordinal_key: { path: ['ordinal'], message: 'Another position of the model stands there' },
    positions_lead_has_a_source: { path: ['lead'], message: 'The lead needs a source of its own: cite one for the field “lead”' },
    fitments_casting_id_part_type_id_fkey: { path: ['partTypeId'], message: 'Castings of the part type it had are told to fit here' },
    fitments_series_id_model_id_fkey: { path: ['modelId'], message: 'Fitments here are told of series of the model it had' },
  },
  remove: (factId, trx) => removeRow(Position, factId, trx),
  gather: positionEvidence,
  restsOn: ({ modelId }) => Promise.resolve({ makers: [], models: [modelId] }),
};
