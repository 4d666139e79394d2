// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { changedFirst, isChanged, sayChange, sayOutcome, sayUnlisted } from '#client/features/workbench/trial-words.ts';
import type { TrialRow } from '#client/features/workbench/trial-words.ts';

const row = (draft: TrialRow['draft'], inForce: TrialRow['inForce']): TrialRow => ({ item: { subject: null, mark: 'BBOCB', text: '' }, draft, inForce });
const ONE = { reading: 'decoded', dates: ['1941-01-13'] } as const;
const NONE = { reading: 'impossible', dates: [] } as const;
const said = (readings: { readonly reading: 'decoded' | 'ambiguous' | 'impossible'; readonly dates: readonly string[] }) => sayOutcome({ ...readings, dates: [...readings.dates] });

describe('words of a trial', () => {
  it('say the dates of a mark, the first of many', () => {
    expect(said(ONE)).toBe('13 Jan 1941');
    expect(said(NONE)).toBe('no date');
    expect(said({ reading: 'ambiguous', dates: ['1919-02-10/1919-02-16', '1939-02-13/1939-02-19'] })).toBe('10–16 Feb 1919; 13–19 Feb 1939');
    expect(said({ reading: 'ambiguous', dates: ['1928-01-20', '1929-01-20', '1930-01-20', '1931-01-20', '1932-01-20'] })).toBe('20 Jan 1928; 20 Jan 1929; 20 Jan 1930 and 2 more');
  });
  it('say dates that are no ISO dates as they are', () => {
    expect(said({ reading: 'decoded', dates: ['13 Jan 1941'] })).toBe('13 Jan 1941');
  });
  it('know what comes out otherwise', () => {
    const copy = { ...ONE, dates: [...ONE.dates] };
    expect(isChanged(row(copy, copy))).toBe(false);
    expect(isChanged(row(copy, { ...NONE, dates: [] }))).toBe(true);
    expect(isChanged(row(copy, { ...copy, dates: ['1941-11-03'] }))).toBe(true);
    expect(isChanged(row(copy, null))).toBe(false);
  });
  it('put what comes out otherwise first, and leave the rest in its order', () => {
    const same = row({ ...ONE, dates: [...ONE.dates] }, { ...ONE, dates: [...ONE.dates] });
    const changed = row({ ...ONE, dates: [...ONE.dates] }, { ...NONE, dates: [] });
    const rows = [{ ...same, item: { ...same.item, text: '1' } }, { ...same, item: { ...same.item, text: '2' } }, changed];
    expect(changedFirst(rows)).toEqual([changed, rows[0], rows[1]]);
  });
  it('say what changes against the version in force', () => {
    const counts = { decoded: 1, ambiguous: 0, impossible: 0 };
    const trial = { marks: 1204, draft: counts, inForce: counts, changed: 12, rows: [], unlisted: 0 };
    expect(sayChange(trial)).toBe('12 of 1,204 marks come out otherwise than under the version in force.');
    expect(sayChange({ ...trial, changed: 0 })).toBe('Every mark comes out as under the version in force.');
    expect(sayChange({ ...trial, inForce: null })).toBeNull();
  });
  it('count what is not shown', () => {
    expect(sayUnlisted(0)).toBeNull();
    expect(sayUnlisted(1)).toMatch(/^One more is/);
    expect(sayUnlisted(1500)).toMatch(/^1,500 more are/);
  });
});
