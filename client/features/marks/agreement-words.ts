import type { ReadingInForce } from '#contract/marks.ts';

type Agreement = ReadingInForce['whole'];

/**
 * How many read it so, and how sure that makes it: `3 of 4 read B; between 30 and 95 in 100 would`. The limits are those of Wilson (1927)
 * at 95 %, for how many of all who might read it would read it so.
 */
export function sayAgreement({ agree, readers, low, high }: Agreement, what: string): string {
  return `${agree} of ${readers} ${readers === 1 ? 'reads' : 'read'} ${what}; between ${inHundred(low)} and ${inHundred(high)} in 100 would`;
}

/** Whether somebody read something else there. */
export function isDisputed({ said }: ReadingInForce['places'][number]): boolean {
  return said.length > 1;
}

/** What was read at a place, or that most see nothing there. */
export function sayGlyphText(text: string): string {
  switch (text) {
    case '':
      return 'nothing';
    case '?':
      return 'can’t be read';
    case '*':
      return 'broken away';
    default:
      return text.startsWith('[') ? [...text.slice(1, -1)].join(' or ') : text;
  }
}

function inHundred(share: number): number {
  return Math.round(share * 100);
}
