// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { divisionsOf } from '#client/features/decode/divisions.ts';
import { BBOCB, C147, candidate, span } from './samples.ts';

describe('divisionsOf', () => {
  it('has one line for each way to split', () => {
    expect(divisionsOf(BBOCB.candidates).map(({ groups }) => groups.map(({ start, end, value }) => [start, end, value]))).toEqual([
      [[0, 1, '1'], [1, 3, '13'], [3, 5, '1941']],
      [[0, 2, '11'], [2, 3, '3'], [3, 5, '1941']],
    ]);
  });
  it('runs values together where several share a split', () => {
    expect(divisionsOf(C147.candidates)[0]?.groups.map(({ field, value }) => `${field} ${value}`)).toEqual(['month 3', 'day 14', 'year 1 of 4']);
  });
  it('says a run of values by its ends, and two by name', () => {
    const months = (values: readonly number[]) => divisionsOf(values.map((value) => candidate('1938-01-12', 0.1, [span('month', 0, 1, '?', value)])))[0]?.groups[0]?.value;
    expect(months([3, 1, 2])).toBe('1–3');
    expect(months([1, 2])).toBe('1 / 2');
    expect(months([1, 5, 9])).toBe('1 of 3');
  });
  it('leaves out a field without glyphs', () => {
    expect(divisionsOf([candidate('1938-01-12', 1, [span('month', 0, 1, 'B', 1), span('other', 1, 1, '', 0)])])[0]?.groups).toHaveLength(1);
    expect(divisionsOf([])).toEqual([]);
  });
});
