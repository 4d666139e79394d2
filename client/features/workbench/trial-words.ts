import { parseDay } from '#domain/dates/day.ts';
import { sayDay, saySpan } from '../../lib/say-date.ts';
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

/** What a mark comes out as: its dates, the first few where there are many. */
export function sayOutcome({ reading, dates }: Said): string {
  if (dates.length === 0) return READING_WORDS[reading];
  const said = dates.slice(0, DATES_SAID).map(sayDates).join('; ');
  return dates.length > DATES_SAID ? `${said} and ${sayFigure(dates.length - DATES_SAID)} more` : said;
}

/** Whether the version in force reads the mark otherwise. */
export function isChanged({ draft, inForce }: TrialRow): boolean {
  return inForce !== null && (draft.reading !== inForce.reading || draft.dates.join() !== inForce.dates.join());
}

/** The rows with those that come out otherwise at their head, each part in the order it came in. */
export function changedFirst(rows: readonly TrialRow[]): readonly TrialRow[] {
  return rows.toSorted((one, other) => Number(isChanged(other)) - Number(isChanged(one)));
}

/** What changes against the version in force, in a sentence; null where there is none in force, or no mark to read. */
export function sayChange({ marks, changed, inForce }: Trial): string | null {
  if (inForce === null || marks === 0) return null;
  if (changed === 0) return 'Every mark comes out as under the version in force.';
  return `${sayFigure(changed)} of ${sayFigure(marks)} marks come out otherwise than under the version in force.`;
}

/** Marks on parts that are not public are counted and never shown. */
export function sayUnlisted(unlisted: number): string | null {
  if (unlisted === 0) return null;
  return unlisted === 1
    ? 'One more is on a part that is not public: counted, not listed.'
    : `${sayFigure(unlisted)} more are on parts that are not public: counted, not listed.`;
}

/** A day or span in ISO 8601, said; anything else as it is. */
function sayDates(iso: string): string {
  const [from = '', to = from] = iso.split('/');
  if (!parseDay(from).ok || !parseDay(to).ok) return iso;
  return from === to ? sayDay(from) : saySpan({ from, to });
}
