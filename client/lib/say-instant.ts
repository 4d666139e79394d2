import { sayMoment } from './say-date.ts';

/** To the minute, by the clock of the whole world: `2026-03-04T10:07:31Z` → `4 Mar 2026, 10:07 UTC`. */
export function sayInstant(timestamp: string): string {
  const inUtc = new Date(timestamp).toISOString();
  return `${sayMoment(inUtc)}, ${inUtc.slice(11, 16)} UTC`;
}
