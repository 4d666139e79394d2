import type { Person } from '#contract/contributions.ts';
import { sayCount, sayList } from '../../lib/say-number.ts';

const MINUTE = 60_000;
const HOUR = 60 * MINUTE;
const DAY = 24 * HOUR;

/** How long something has waited: `3 days`, `an hour`, `just now`. Counted down to whole days, hours or minutes. */
export function sayWait(since: string, now: number): string {
  const waited = Math.max(0, now - Date.parse(since));
  if (waited >= DAY) return sayUnits(Math.floor(waited / DAY), 'day');
  if (waited >= HOUR) return sayUnits(Math.floor(waited / HOUR), 'hour');
  return waited >= MINUTE ? sayUnits(Math.floor(waited / MINUTE), 'minute') : 'just now';
}

function sayUnits(count: number, unit: string): string {
  return `${sayCount(count)} ${unit}${count === 1 ? '' : 's'}`;
}

/** `Open with Harrow Lane and Una Kettlemere`. */
export function sayOpenWith(people: readonly Person[]): string {
  return `Open with ${sayList(people.map(({ displayName }) => displayName), 'and')}`;
}
