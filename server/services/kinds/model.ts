import { MachineModel } from '#db/models/machine-model.ts';
import { freeSlug, makerWord } from './free-slug.ts';
import type { KindModule } from './kind-module.ts';
import { modelEvidence } from './model-evidence.ts';
import { NOTHING_RESTS, removeRow, writeRow } from './write-row.ts';

export const model: KindModule<'model'> = {
  kind: 'model',
  belongsBy: 'makerId',
  titleOf: ({ name }) => Promise.resolve(name),
  makerOf: ({ makerId }) => Promise.resolve(makerId),
  write: async (payload, writing, trx) => {
    const slug = writing.slug ?? (await freeSlug({ table: 'models', text: `${await makerWord(payload.makerId, trx)} ${payload.name}` }, trx));
    await writeRow(MachineModel, writing, { ...payload, slug }, trx);
    return slug;
  },
  refusals: {
    models_maker_id_name_key: { path: ['name'], message: 'The maker has another model called so' },
    models_maker_id_maker_builds_machines_fkey: { path: ['makerId'], message: 'This maker built no machines, the catalogue says' },
    series_works_id_maker_id_fkey: { path: ['makerId'], message: 'Its series are told to come from another maker’s works' },
  },
  remove: (factId, trx) => removeRow(MachineModel, factId, trx),
  gather: modelEvidence,
  restsOn: () => Promise.resolve(NOTHING_RESTS),
};
