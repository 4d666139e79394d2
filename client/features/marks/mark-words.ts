import type { MarkPage } from '#contract/marks.ts';
import type { MarkKind, MarkTechnique } from '#domain/vocabulary.ts';
import { sayCount } from '../../lib/say-number.ts';

const KINDS: Readonly<Record<MarkKind, string>> = {
  'casting-number': 'Casting number',
  'date-code': 'Date mark',
  'foundry-mark': 'Foundry mark',
  serial: 'Serial',
  plate: 'Plate',
  other: 'Mark',
};

const TECHNIQUES: Readonly<Record<MarkTechnique, string>> = { cast: 'cast when poured', stamped: 'stamped after machining' };

/** `Date mark, cast when poured`. */
export function sayMarkKind({ kind, technique }: Pick<MarkPage, 'kind' | 'technique'>): string {
  return `${KINDS[kind]}, ${TECHNIQUES[technique]}`;
}

/** What the mark was worked out to mean, in a sentence. */
export function sayDates({ status, total }: Pick<NonNullable<MarkPage['dates']>, 'status' | 'total'>): string {
  if (status === 'none') return 'No cipher on record can date it.';
  return total === 1 ? 'It can mean one date.' : `It can mean ${sayCount(total)} dates.`;
}
