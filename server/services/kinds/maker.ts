import { Maker } from '#db/models/maker.ts';
import { freeSlug } from './free-slug.ts';
import type { KindModule } from './kind-module.ts';
import { makerEvidence } from './maker-evidence.ts';
import { NOTHING_RESTS, removeRow, writeRow } from './write-row.ts';

export const maker: KindModule<'maker'> = {
  kind: 'maker',
  belongsBy: 'makerId',
  titleOf: ({ name }) => Promise.resolve(name),
  // A maker that is new belongs to no scope yet; one there is decides for itself by its id, not by what it says.
  makerOf: () => Promise.resolve(null),
  write: async (payload, writing, trx) => {
    const slug = writing.slug ?? (await freeSlug({ table: 'makers', text: payload.name }, trx));
    await writeRow(Maker, writing, { ...payload, slug }, trx);
    return slug;
  },
  refusals: {
    makers_name_key: { path: ['name'], message: 'Another maker in the catalogue is called so' },
    models_maker_id_maker_builds_machines_fkey: { path: ['buildsMachines'], message: 'The catalogue has models it built' },
    castings_poured_by_id_poured_by_pours_iron_fkey: { path: ['poursIron'], message: 'The catalogue has castings it poured' },
    ciphers_foundry_id_foundry_pours_iron_fkey: { path: ['poursIron'], message: 'The catalogue has ciphers on castings it poured' },
  },
  remove: (factId, trx) => removeRow(Maker, factId, trx),
  gather: makerEvidence,
  restsOn: () => Promise.resolve(NOTHING_RESTS),
};
