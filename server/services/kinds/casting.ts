import { CastingPartNumber } from '#db/models/casting-part-number.ts';
import { CastingTell } from '#db/models/casting-tell.ts';
import { Casting } from '#db/models/casting.ts';
import { castingEvidence } from './casting-evidence.ts';
import { freeSlug, makerWord } from './free-slug.ts';
import type { KindModule } from './kind-module.ts';
import { removeRow, writeRow } from './write-row.ts';

export const casting: KindModule<'casting'> = {
  kind: 'casting',
  belongsBy: 'partTypeId',
  titleOf: ({ number, pattern }) => Promise.resolve(pattern === null ? number : `${number} (${pattern})`),
  makerOf: ({ makerId }) => Promise.resolve(makerId),
  write: async ({ tells, partNumbers, ...columns }, writing, trx) => {
    const { factId } = writing;
    const { makerId, number, pattern } = columns;
    const slug = writing.slug ?? (await freeSlug({ table: 'castings', text: `${await makerWord(makerId, trx)} ${number} ${pattern ?? ''}` }, trx));
    await writeRow(Casting, writing, { ...columns, slug }, trx);
    await CastingTell.query(trx).delete().where({ castingId: factId });
    await CastingPartNumber.query(trx).delete().where({ castingId: factId });
    if (tells.length > 0) await CastingTell.query(trx).insert(tells.map((tell, at) => ({ castingId: factId, ordinal: at + 1, ...tell })));
    if (partNumbers.length > 0) {
      await CastingPartNumber.query(trx).insert(partNumbers.map((one, at) => ({ castingId: factId, ordinal: at + 1, ...one })));
    }
    return slug;
  },
  refusals: {
    castings_key: { path: ['number'], message: 'The catalogue has this number of this maker, poured by the same and of the same pattern' },
    castings_poured_by_id_poured_by_pours_iron_fkey: { path: ['pouredById'], message: 'This maker poured no iron, the catalogue says' },
    casting_part_numbers_casting_id_number_key_key: { path: ['partNumbers'], message: 'A part number stands there twice' },
    fitments_position_id_model_id_part_type_id_fkey: { path: ['partTypeId'], message: 'It is told to fit positions of the part type it had' },
    supersessions_old_id_part_type_id_fkey: { path: ['partTypeId'], message: 'A casting of the part type it had followed it or was followed by it' },
    supersessions_new_id_part_type_id_fkey: { path: ['partTypeId'], message: 'A casting of the part type it had followed it or was followed by it' },
  },
  remove: (factId, trx) => removeRow(Casting, factId, trx),
  gather: castingEvidence,
  restsOn: ({ makerId, pouredById }) => Promise.resolve({ makers: pouredById === null ? [makerId] : [makerId, pouredById], models: [] }),
};
