import type { SourceKind } from '#contract/common.ts';
import type { SourcePage } from '#contract/sources.ts';
import { paths } from '../../lib/paths.ts';

const KINDS: Readonly<Record<SourceKind, string>> = {
  book: 'book',
  drawing: 'drawing',
  plate: 'plate',
  photo: 'photo',
  sighting: 'sighting',
  correspondence: 'correspondence',
  'own-knowledge': 'a member’s own knowledge',
};

export function saySourceKind(kind: SourceKind): string {
  return KINDS[kind];
}

type BackedFact = SourcePage['behind'][number];

const FACTS: Readonly<Record<BackedFact['kind'], readonly [one: string, many: string]>> = {
  maker: ['Maker', 'Makers'],
  works: ['Works', 'Works'],
  model: ['Model', 'Models'],
  'part-type': ['Part type', 'Part types'],
  position: ['Position', 'Positions'],
  casting: ['Casting', 'Castings'],
  fitment: ['Where a casting belongs', 'Where castings belong'],
  supersession: ['What followed what', 'What followed what'],
  series: ['Series', 'Series'],
  'serial-range': ['Serial range', 'Serial ranges'],
  anchor: ['Dated machine', 'Dated machines'],
  cipher: ['Cipher', 'Ciphers'],
};

/** What facts of a kind are called, for one or for many. */
export function sayFactKind(kind: BackedFact['kind'], count: number): string {
  const [one, many] = FACTS[kind];
  return count === 1 ? one : many;
}

/** Where a fact stands; null for those that have no page of their own. */
export function pathOfFact({ kind, slug }: BackedFact): string | null {
  if (slug === null) return null;
  switch (kind) {
    case 'maker':
    case 'works':
      return paths.maker(slug);
    case 'model':
    case 'position':
    case 'series':
    case 'anchor':
      return paths.model(slug);
    case 'part-type':
      return paths.partType(slug);
    case 'casting':
    case 'fitment':
    case 'supersession':
      return paths.casting(slug);
    case 'serial-range':
      return paths.serialRange(slug);
    case 'cipher':
      return paths.cipher(slug);
  }
}

/** The facts a source stands behind, by kind, in the order the kinds are first met. */
export function groupFacts(
  behind: readonly BackedFact[],
): readonly { readonly kind: BackedFact['kind']; readonly facts: readonly BackedFact[] }[] {
  const groups = new Map<BackedFact['kind'], BackedFact[]>();
  for (const fact of behind) groups.set(fact.kind, [...(groups.get(fact.kind) ?? []), fact]);
  return [...groups].map(([kind, facts]) => ({ kind, facts }));
}
