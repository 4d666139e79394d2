import type { CandidateAnswer } from '#contract/decode.ts';
import type { Division } from '../../ui/plate-brackets.tsx';

/** How many ways to split are drawn under the plate; the table has them all. */
export const DIVISIONS_SHOWN = 4;
const VALUES_SHOWN = 2;

const FIELD_WORDS: Readonly<Record<CandidateAnswer['spans'][number]['field'], string>> = {
  year: 'year',
  quarter: 'quarter',
  month: 'month',
  week: 'week',
  day: 'day',
  dayOfYear: 'day of year',
  other: 'other',
  literal: 'fixed',
};

export function fieldWord(field: CandidateAnswer['spans'][number]['field']): string {
  return FIELD_WORDS[field];
}

/** The ways the candidates split the mark, in the order of the candidates; where several values share one split, the values are run together. */
export function divisionsOf(candidates: readonly CandidateAnswer[]): Division[] {
  const bySplit = new Map<string, CandidateAnswer['spans'][]>();
  for (const { spans } of candidates) {
    const key = spans.map(({ field, start, end }) => `${field} ${start} ${end}`).join(', ');
    bySplit.set(key, [...(bySplit.get(key) ?? []), spans]);
  }
  return [...bySplit].map(([key, readings]) => ({
    key,
    groups: (readings[0] ?? [])
      .map(({ field, start, end }, place) => ({
        field: fieldWord(field),
        start,
        end,
        value: sayValues(readings.flatMap((spans) => spans[place] ?? [])),
      }))
      .filter(({ start, end }) => end > start),
  }));
}

function sayValues(spans: CandidateAnswer['spans']): string {
  const values = [...new Set(spans.map(({ value, text }) => (value === null ? text : String(value))))];
  if (values.length <= VALUES_SHOWN) return values.join(' / ');
  const numbers = values.map(Number).sort((a, b) => a - b);
  const first = numbers[0];
  const last = numbers.at(-1);
  const run = first !== undefined && last !== undefined && last - first === numbers.length - 1;
  return run ? `${first}–${last}` : `1 of ${values.length}`;
}
