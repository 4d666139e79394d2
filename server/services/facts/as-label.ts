import { FACT_LIMITS } from '#contract/kinds/kind.ts';

/** A title as a column of labels holds it. */
export function asLabel(title: string): string {
  return title.length <= FACT_LIMITS.label ? title : `${title.slice(0, FACT_LIMITS.label - 1).trimEnd()}…`;
}
