import type { SourceKind } from '#contract/common.ts';
import { formOf } from '#contract/kinds.ts';
import type { SourcePage } from '#contract/sources.ts';
import type { FactKind } from '#domain/vocabulary.ts';
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

type BackedFact = Pick<SourcePage['behind'][number], 'kind' | 'slug'>;

/** What facts of a kind are called, for one or for many. */
export function sayFactKind(kind: FactKind, count: number): string {
  const { name, names } = formOf(kind);
  return count === 1 ? name : names;
}

/** Where a fact stands; null for those that have no page of their own. */
export function pathOfFact({ kind, slug }: BackedFact): string | null {
  return slug === null ? null : paths[formOf(kind).page](slug);
}

/** The facts a source stands behind, by kind, in the order the kinds are first met. */
export function groupFacts<Fact extends BackedFact>(behind: readonly Fact[]): readonly { readonly kind: Fact['kind']; readonly facts: readonly Fact[] }[] {
  const groups = new Map<Fact['kind'], Fact[]>();
  for (const fact of behind) groups.set(fact.kind, [...(groups.get(fact.kind) ?? []), fact]);
  return [...groups].map(([kind, facts]) => ({ kind, facts }));
}
