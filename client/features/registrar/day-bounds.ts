import { writeDay } from '#domain/dates/day.ts';
import { dayFrom } from '../../lib/say-date.ts';

/** The instant a day begins at by the clock of the whole world, as the trail takes it: `2026-03-04` → `2026-03-04T00:00:00Z`. */
export function startOfDay(day: string): string {
  return `${day}T00:00:00Z`;
}

/** The instant a day has ended at: the next one's first. */
export function endOfDay(day: string): string {
  return startOfDay(writeDay(dayFrom(day) + 1));
}

/** The day that begins at an instant or, for `until`, the last one before it. */
export function dayShown(instant: string | undefined, bound: 'since' | 'until'): string {
  if (instant === undefined) return '';
  const inUtc = new Date(instant).toISOString();
  const day = inUtc.slice(0, 10);
  return bound === 'until' && inUtc.slice(11) === '00:00:00.000Z' ? writeDay(dayFrom(day) - 1) : day;
}
