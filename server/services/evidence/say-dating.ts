import type { MarkDating } from '#server/services/marks/mark-dating.ts';
import { sayDates } from './say-dates.ts';

/** The dates of a mark, or why it has none. */
export function sayDating({ status, candidates, total, reason }: MarkDating): string {
  return status === 'none' ? (reason ?? 'No date') : sayDates(candidates, total);
}

/** Whether two ciphers read a mark alike: the same days; how their shares lie is not asked. */
export function sameDating(one: MarkDating, other: MarkDating): boolean {
  return (
    one.status === other.status &&
    one.total === other.total &&
    one.candidates.every((candidate, place) => {
      const beside = other.candidates[place];
      return beside !== undefined && candidate.from === beside.from && candidate.to === beside.to;
    })
  );
}
