import type { CastingPage } from '#contract/castings.ts';

/** `B4406, first pattern`. */
export function sayCasting({ number, pattern }: Pick<CastingPage, 'number' | 'pattern'>): string {
  return pattern === null ? number : `${number}, ${pattern}`;
}

/** What two castings that followed each other can stand in for, said of the one that is named beside it. */
export function sayInterchange(interchange: CastingPage['follows'][number]['interchange'], named: 'older' | 'newer'): string {
  if (interchange === 'both-ways') return 'each goes in place of the other';
  return named === 'newer'
    ? 'it goes in place of this one, but this one not in place of it'
    : 'this one goes in place of it, but it not in place of this one';
}
