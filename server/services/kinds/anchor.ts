import { Anchor } from '#db/models/anchor.ts';
import { nameOf, titleOf } from '../facts/name-of.ts';
import { anchorEvidence } from './anchor-evidence.ts';
import type { KindModule } from './kind-module.ts';
import { removeRow, writeRow } from './write-row.ts';

export const anchor: KindModule<'anchor'> = {
  kind: 'anchor',
  belongsBy: 'modelId',
  titleOf: async ({ seriesId, number }, knex) => `${await titleOf(seriesId, knex)}, ${BigInt(number)}`,
  makerOf: async ({ seriesId }, knex) => (await nameOf(seriesId, knex))?.makerId ?? null,
  write: async (payload, writing, trx) => {
    await writeRow(Anchor, writing, payload, trx);
    return null;
  },
  refusals: {
    anchors_series_id_number_meaning_key: { path: ['number'], message: 'The catalogue has such a day of this machine' },
  },
  remove: (factId, trx) => removeRow(Anchor, factId, trx),
  gather: anchorEvidence,
  restsOn: async ({ seriesId }, knex) => {
    const modelId = (await nameOf(seriesId, knex))?.modelId;
    return { makers: [], models: modelId ? [modelId] : [] };
  },
};
