import { Works } from '#db/models/works.ts';
import { titleOf } from '../facts/name-of.ts';
import { freeSlug } from './free-slug.ts';
import type { KindModule } from './kind-module.ts';
import { worksEvidence } from './works-evidence.ts';
import { NOTHING_RESTS, removeRow, writeRow } from './write-row.ts';

export const works: KindModule<'works'> = {
  kind: 'works',
  belongsBy: 'makerId',
  titleOf: async ({ makerId, name }, knex) => `${await titleOf(makerId, knex)}, ${name}`,
  makerOf: ({ makerId }) => Promise.resolve(makerId),
  write: async (payload, writing, trx) => {
    const slug = writing.slug ?? (await freeSlug({ table: 'works', text: payload.name, among: { makerId: payload.makerId } }, trx));
    await writeRow(Works, writing, { ...payload, slug }, trx);
    return slug;
  },
  refusals: {
    works_maker_id_slug_key: { path: ['name'], message: 'The maker has works called so' },
    series_works_id_maker_id_fkey: { path: ['makerId'], message: 'Series of another maker’s models are told to come from it' },
  },
  remove: (factId, trx) => removeRow(Works, factId, trx),
  gather: worksEvidence,
  restsOn: () => Promise.resolve(NOTHING_RESTS),
};
