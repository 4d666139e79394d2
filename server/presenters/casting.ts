import type { CastingItem, CastingPage, Fitment } from '#contract/castings.ts';
import type { Casting } from '#db/models/casting.ts';
import type { Supersession } from '#db/models/supersession.ts';
import type { FactRecords } from '#server/services/fact-records.ts';
import type { CastingOnRecord, PlacedFitment } from '#server/services/read-casting.ts';
import { presentNamed, presentOpenSpan, presentProvenance } from './common.ts';
import { loaded } from './loaded.ts';

type CastingRef = Pick<CastingItem, 'slug' | 'number' | 'pattern'>;

export function presentCastingItem(casting: Casting): CastingItem {
  return {
    ...presentCastingRef(casting),
    id: casting.id,
    maker: presentNamed(loaded(casting.maker)),
    partType: presentNamed(loaded(casting.partType)),
    made: casting.made && presentOpenSpan(casting.made),
  };
}

export function presentCasting({ casting, fitments, follows, followedBy, ciphers, records }: CastingOnRecord): CastingPage {
  return {
    ...presentCastingItem(casting),
    pouredBy: casting.pouredBy ? presentNamed(casting.pouredBy) : null,
    note: casting.note,
    caution: loaded(casting.partType).caution,
    partNumbers: loaded(casting.partNumbers).map(({ number, note }) => ({ number, note })),
    tells: loaded(casting.tells).map(({ place, tell }) => ({ place, tell })),
    fitments: fitments.map((fitment) => presentFitment(fitment, records)),
    follows: follows.map((one) => presentSuccession(one, loaded(one.oldCasting), records)),
    followedBy: followedBy.map((one) => presentSuccession(one, loaded(one.newCasting), records)),
    ciphers: ciphers.map(({ slug, title }) => ({ slug, title })),
    provenance: presentProvenance(records.of(casting.id)),
  };
}

function presentCastingRef({ slug, number, pattern }: Casting): CastingRef {
  return { slug, number, pattern };
}

function presentFitment({ fitment, built }: PlacedFitment, records: FactRecords): Fitment {
  const position = loaded(fitment.position);
  return {
    id: fitment.id,
    model: presentNamed(loaded(position.model)),
    position: presentNamed(position),
    prefix: fitment.series?.prefix ?? null,
    first: fitment.numbers.from,
    last: fitment.numbers.to,
    built,
    verdict: fitment.verdict,
    note: fitment.note,
    provenance: presentProvenance(records.of(fitment.id)),
  };
}

function presentSuccession(supersession: Supersession, other: Casting, records: FactRecords): CastingPage['follows'][number] {
  return {
    id: supersession.id,
    casting: presentCastingRef(other),
    interchange: supersession.interchange,
    note: supersession.note,
    provenance: presentProvenance(records.of(supersession.id)),
  };
}
