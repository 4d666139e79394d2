import type { FactKind } from '#domain/vocabulary.ts';
import { paths } from '../../lib/paths.ts';
import { pathOfFact } from '../sources/say-source.ts';

/** Where a fact stands: on a page of the catalogue or, where its kind has none, with its history. */
export function pathOfRef({ id, kind, slug }: { readonly id: string; readonly kind: FactKind; readonly slug: string | null }): string {
  return pathOfFact({ kind, slug }) ?? paths.factHistory(id);
}
