import { WearLimit } from '#db/models/wear-limit.ts';
import { nameOf, titleOf } from '../facts/name-of.ts';
import type { KindModule } from './kind-module.ts';
import { wearLimitEvidence } from './wear-limit-evidence.ts';
import { NOTHING_RESTS, removeRow, writeRow } from './write-row.ts';

export const wearLimit: KindModule<'wear-limit'> = {
  kind: 'wear-limit',
  belongsBy: 'partTypeId',
  titleOf: async ({ partTypeId, modelId, measure }, knex) => {
    const on = modelId === null ? '' : ` on ${await titleOf(modelId, knex)}`;
    return `${await titleOf(partTypeId, knex)}${on}, ${measure}`;
  },
  makerOf: async ({ modelId }, knex) => (modelId === null ? null : ((await nameOf(modelId, knex))?.makerId ?? null)),
  write: async ({ asBuilt, limit, ...columns }, writing, trx) => {
    await writeRow(WearLimit, writing, { ...columns, asBuiltFrom: asBuilt?.from ?? null, asBuiltTo: asBuilt?.to ?? null, wearsTo: limit }, trx);
    return null;
  },
  refusals: { wear_limits_key: { path: ['measure'], message: 'The catalogue has a limit of this measure' } },
  remove: (factId, trx) => removeRow(WearLimit, factId, trx),
  gather: wearLimitEvidence,
  restsOn: () => Promise.resolve(NOTHING_RESTS),
};
