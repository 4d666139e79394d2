import { sayFigure } from '../../lib/say-number.ts';
import type { Trial } from './workbench-queries.ts';

export type TrialRow = Trial['rows'][number];
type Said = TrialRow['draft'];

export const READING_WORDS: Readonly<Record<Said['reading'], string>> = {
  decoded: 'one date',
  ambiguous: 'several dates',
  impossible: 'no date',
};

const DATES_SAID = 3;

/** What a mark comes out as: its dates, the first few where there are many; the register itself lists no more than so many. */
export function sayOutcome({ reading, dates }: Said): string {
  if (dates.length === 0) return READING_WORDS[reading];
  const said = dates.slice(0, DATES_SAID).join('; ');
  return dates.length > DATES_SAID ? `${said} and more` : said;
}

/** Whether the version in force reads the mark otherwise. */
export function isChanged({ draft, inForce }: TrialRow): boolean {
  return inForce !== null && (draft.reading !== inForce.reading || draft.dates.join() !== inForce.dates.join());
}

/** What changes against the version in force, in a sentence; null where there is none in force, or no mark to read. */
export function sayChange({ marks, changed, inForce }: Trial): string | null {
  if (inForce === null || marks === 0) return null;
  if (changed === 0) return 'Every mark comes out as under the version in force.';
  return `${sayFigure(changed)} of ${sayFigure(marks)} marks come out otherwise than under the version in force.`;
}

/** The marks that no row shows: past the first of each sort, or on parts that are not public, which are counted and never shown. */
export function sayNotListed({ marks, rows, unlisted }: Pick<Trial, 'marks' | 'rows' | 'unlisted'>): readonly string[] {
  const past = marks - unlisted - rows.length;
  return [
    ...(past > 0 ? [`The first of each sort are listed; ${sayFigure(past)} more ${past === 1 ? 'is' : 'are'} counted above.`] : []),
    ...(unlisted > 0 ? [`${sayFigure(unlisted)} ${unlisted === 1 ? 'is on a part that is' : 'are on parts that are'} not public: counted, not listed.`] : []),
  ];
}
