import { Cipher } from '#db/models/cipher.ts';
import { cipherEvidence } from './cipher-evidence.ts';
import { freeSlug } from './free-slug.ts';
import type { KindModule } from './kind-module.ts';
import { removeRow, writeRow } from './write-row.ts';

export const cipher: KindModule<'cipher'> = {
  kind: 'cipher',
  belongsBy: 'makerId',
  titleOf: ({ title }) => Promise.resolve(title),
  makerOf: ({ makerId }) => Promise.resolve(makerId),
  // The definition is kept in the version alone.
  write: async ({ makerId, foundryId, title, machineKind, note }, writing, trx) => {
    const slug = writing.slug ?? (await freeSlug({ table: 'ciphers', text: title }, trx));
    await writeRow(Cipher, writing, { makerId, foundryId, title, machineKind, note, slug }, trx);
    return slug;
  },
  refusals: {
    ciphers_key: { path: ['title'], message: 'The maker has another cipher called so' },
    ciphers_foundry_id_foundry_pours_iron_fkey: { path: ['foundryId'], message: 'This maker poured no iron, the catalogue says' },
  },
  remove: (factId, trx) => removeRow(Cipher, factId, trx),
  gather: cipherEvidence,
  restsOn: ({ makerId, foundryId }) => Promise.resolve({ makers: foundryId === null ? [makerId] : [makerId, foundryId], models: [] }),
};
