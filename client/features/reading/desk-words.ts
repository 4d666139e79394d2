import type { ReadingDesk } from '#contract/marks.ts';
import { sayMoment } from '../../lib/say-date.ts';

export type Standing = { readonly title: string; readonly body: string };

/** Whose reading this is among the others, and what of theirs the reader is shown. */
export function sayStanding({ blind, first, isHolder, mine }: Pick<ReadingDesk, 'blind' | 'first' | 'isHolder' | 'mine'>): Standing {
  if (blind) {
    return first
      ? { title: 'Yours is the first reading', body: 'You read it without being told what its holder says of the part, so that only the iron speaks. All is shown once yours is saved.' }
      : { title: 'Yours is an independent reading', body: 'You read it without seeing what others read, what it can mean and what part it is on. All is shown once yours is saved.' };
  }
  if (mine !== null) {
    return { title: 'You have read it before', body: `Your reading of ${sayMoment(mine.at)} stands on the plate. What you save now goes on record beside it and counts in its place, unless you have seen meanwhile what others read.` };
  }
  if (first) {
    return { title: 'Yours is the first reading', body: 'Whoever reads it next does so without seeing yours: your reading and the date stay hidden from them until theirs is saved.' };
  }
  const body = isHolder
    ? 'Yours goes on record beside theirs; as you hold the part, it confirms nothing.'
    : 'You may have seen what others read. Yours goes on record beside theirs and does not count as independent.';
  return { title: 'Others have read it', body };
}
