import type { MakerItem, MakerPage } from '#contract/makers.ts';
import type { Cipher } from '#db/models/cipher.ts';
import type { CountedMaker } from '#server/services/list-makers.ts';
import type { MakerOnRecord } from '#server/services/read-maker.ts';
import { presentNamed, presentOpenSpan, presentProvenance, presentYears } from './common.ts';
import { loaded } from './loaded.ts';

export function presentMakerItem({ maker, counts }: CountedMaker): MakerItem {
  return {
    id: maker.id,
    slug: maker.slug,
    name: maker.name,
    place: maker.place,
    buildsMachines: maker.buildsMachines,
    poursIron: maker.poursIron,
    active: presentYears(maker.founded, maker.closed),
    ...counts,
  };
}

export function presentMaker(onRecord: MakerOnRecord): MakerPage {
  const { maker, works, models, ciphers, pouredFor, records } = onRecord;
  return {
    ...presentMakerItem(onRecord),
    foundryMark: maker.foundryMark,
    note: maker.note,
    works: works.map(({ id, slug, name, place }) => ({ id, slug, name, place, provenance: presentProvenance(records.of(id)) })),
    modelList: models.map((model) => ({ ...presentNamed(model), kindOfMachine: model.machineKind, made: presentOpenSpan(model.made) })),
    cipherList: ciphers.map(presentCipherOfMaker),
    pouredFor: pouredFor.map(presentNamed),
    provenance: presentProvenance(records.of(maker.id)),
  };
}

function presentCipherOfMaker(cipher: Cipher): MakerPage['cipherList'][number] {
  const version = loaded(cipher.versionInForce);
  return {
    slug: cipher.slug,
    title: cipher.title,
    foundry: cipher.foundry ? presentNamed(cipher.foundry) : null,
    used: presentOpenSpan(version.used),
    version: version.number,
  };
}
