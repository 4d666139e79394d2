import { Casting } from '#db/models/casting.ts';
import { Supersession } from '#db/models/supersession.ts';
import { nameOf, titleOf } from '../facts/name-of.ts';
import type { KindModule } from './kind-module.ts';
import { supersessionEvidence } from './supersession-evidence.ts';
import { NOTHING_RESTS, removeRow, writeRow } from './write-row.ts';

export const supersession: KindModule<'supersession'> = {
  kind: 'supersession',
  belongsBy: 'partTypeId',
  titleOf: async ({ oldId, newId }, knex) => `${await titleOf(oldId, knex)} followed by ${await titleOf(newId, knex)}`,
  makerOf: async ({ oldId }, knex) => (await nameOf(oldId, knex))?.makerId ?? null,
  write: async (payload, writing, trx) => {
    const { partTypeId } = await Casting.query(trx).findById(payload.oldId).throwIfNotFound();
    await writeRow(Supersession, writing, { ...payload, partTypeId }, trx);
    return null;
  },
  refusals: {
    supersessions_new_id_part_type_id_fkey: { path: ['newId'], message: 'A casting of another part type than the old one’s' },
    supersessions_old_id_new_id_key: { path: ['newId'], message: 'The catalogue has this supersession' },
    supersessions_no_cycle: { path: ['newId'], message: 'The old casting would come to follow itself' },
  },
  remove: (factId, trx) => removeRow(Supersession, factId, trx),
  gather: supersessionEvidence,
  restsOn: () => Promise.resolve(NOTHING_RESTS),
};
