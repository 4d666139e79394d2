import type { CipherItem, CipherPage } from '#contract/ciphers.ts';
import type { Cipher } from '#db/models/cipher.ts';
import type { CipherOnRecord } from '#server/services/read-cipher.ts';
import { presentNamed, presentOpenSpan, presentProvenance } from './common.ts';
import { loaded } from './loaded.ts';

export function presentCipherItem(cipher: Cipher): CipherItem {
  const version = loaded(cipher.versionInForce);
  return {
    id: cipher.id,
    slug: cipher.slug,
    title: cipher.title,
    maker: presentNamed(loaded(cipher.maker)),
    foundry: cipher.foundry ? presentNamed(cipher.foundry) : null,
    kindOfMachine: cipher.machineKind,
    used: presentOpenSpan(version.used),
    version: version.number,
  };
}

export function presentCipher({ cipher, record }: CipherOnRecord): CipherPage {
  return {
    ...presentCipherItem(cipher),
    definition: loaded(cipher.versionInForce).definition,
    note: cipher.note,
    provenance: presentProvenance(record),
  };
}
