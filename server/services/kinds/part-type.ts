import { PartType } from '#db/models/part-type.ts';
import { freeSlug } from './free-slug.ts';
import type { KindModule } from './kind-module.ts';
import { partTypeEvidence } from './part-type-evidence.ts';
import { NOTHING_RESTS, removeRow, writeRow } from './write-row.ts';

export const partType: KindModule<'part-type'> = {
  kind: 'part-type',
  belongsBy: 'partTypeId',
  titleOf: ({ name }) => Promise.resolve(name),
  makerOf: () => Promise.resolve(null),
  write: async (payload, writing, trx) => {
    const slug = writing.slug ?? (await freeSlug({ table: 'part_types', text: payload.name }, trx));
    await writeRow(PartType, writing, { ...payload, slug }, trx);
    return slug;
  },
  refusals: { part_types_name_key: { path: ['name'], message: 'Another part type is called so' } },
  remove: (factId, trx) => removeRow(PartType, factId, trx),
  gather: partTypeEvidence,
  restsOn: () => Promise.resolve(NOTHING_RESTS),
};
