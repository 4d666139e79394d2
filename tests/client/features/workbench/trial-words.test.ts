// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { isChanged, sayChange, sayNotListed, sayOutcome } from '#client/features/workbench/trial-words.ts';
import type { TrialRow } from '#client/features/workbench/trial-words.ts';

const row = (draft: TrialRow['draft'], inForce: TrialRow['inForce']): TrialRow => ({ item: { subject: null, mark: 'BBOCB', text: '' }, draft, inForce });
const ONE = { reading: 'decoded', dates: ['13 Jan 1941'] } as const;
const NONE = { reading: 'impossible', dates: [] } as const;
const said = (readings: { readonly reading: 'decoded' | 'ambiguous' | 'impossible'; readonly dates: readonly string[] }) => sayOutcome({ ...readings, dates: [...readings.dates] });

describe('words of a trial', () => {
  it('say the dates of a mark, the first of many', () => {
    expect(said(ONE)).toBe('13 Jan 1941');
    expect(said(NONE)).toBe('no date');
    expect(said({ reading: 'ambiguous', dates: ['10–16 Feb 1919', '13–19 Feb 1939'] })).toBe('10–16 Feb 1919; 13–19 Feb 1939');
    expect(said({ reading: 'ambiguous', dates: ['20 Jan 1928', '20 Jan 1929', '20 Jan 1930', '20 Jan 1931'] })).toBe('20 Jan 1928; 20 Jan 1929; 20 Jan 1930 and more');
  });
  it('know what comes out otherwise', () => {
    const copy = { ...ONE, dates: [...ONE.dates] };
    expect(isChanged(row(copy, copy))).toBe(false);
    expect(isChanged(row(copy, { ...NONE, dates: [] }))).toBe(true);
    expect(isChanged(row(copy, { ...copy, dates: ['3 Nov 1941'] }))).toBe(true);
    expect(isChanged(row(copy, null))).toBe(false);
  });
  it('say what changes against the version in force', () => {
    const counts = { decoded: 1, ambiguous: 0, impossible: 0 };
    const trial = { marks: 1204, draft: counts, inForce: counts, changed: 12, rows: [], unlisted: 0 };
    expect(sayChange(trial)).toBe('12 of 1,204 marks come out otherwise than under the version in force.');
    expect(sayChange({ ...trial, changed: 0 })).toBe('Every mark comes out as under the version in force.');
    expect(sayChange({ ...trial, inForce: null })).toBeNull();
  });
  it('count what no row shows', () => {
    const counted = (marks: number, listed: number, unlisted: number) =>
      sayNotListed({ marks, unlisted, rows: Array.from({ length: listed }, () => row({ ...ONE, dates: [] }, null)) });
    expect(counted(3, 3, 0)).toEqual([]);
    expect(counted(3, 2, 1)).toEqual(['1 is on a part that is not public: counted, not listed.']);
    expect(counted(2000, 25, 500)).toEqual(['The first of each sort are listed; 1,475 more are counted above.', '500 are on parts that are not public: counted, not listed.']);
    expect(counted(27, 26, 0)).toEqual(['The first of each sort are listed; 1 more is counted above.']);
  });
});
