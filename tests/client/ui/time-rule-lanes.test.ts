// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { clipBand, laneRows } from '#client/ui/time-rule-lanes.ts';
import { dayOf } from '#domain/dates/day.ts';

const RULE = { from: dayOf(1940, 1, 1), to: dayOf(1941, 12, 31) };

describe('clipBand', () => {
  it('cuts a band at the rule and says which ends go on', () => {
    expect(clipBand({ from: dayOf(1928, 1, 1), to: dayOf(1954, 12, 31) }, RULE)).toEqual({ ...RULE, runsOff: { left: true, right: true } });
    const inside = { from: dayOf(1940, 5, 1), to: dayOf(1941, 5, 1) };
    expect(clipBand(inside, RULE)).toEqual({ ...inside, runsOff: { left: false, right: false } });
    expect(clipBand({ from: null, to: dayOf(1940, 5, 1) }, RULE)).toEqual({ from: RULE.from, to: dayOf(1940, 5, 1), runsOff: { left: true, right: false } });
  });
  it('is nothing where the band lies beside the rule', () => {
    expect(clipBand({ from: dayOf(1950, 1, 1), to: null }, RULE)).toBeNull();
    expect(clipBand({ from: null, to: dayOf(1939, 12, 31) }, RULE)).toBeNull();
  });
});

describe('laneRows', () => {
  it('says every lane in dates', () => {
    const rows = laneRows([
      { kind: 'band', name: 'cipher in use', look: 'outline', bands: [{ from: dayOf(1928, 1, 1), to: null, label: '1928 on' }] },
      { kind: 'ticks', name: 'poured', ticks: [{ key: 'a', from: dayOf(1941, 1, 13), to: dayOf(1941, 1, 13), share: 0.5, tone: null, label: '13 Jan 1941', note: 'share ½' }] },
      { kind: 'window', name: '3C 1207 built', span: { from: dayOf(1941, 2, 10), to: dayOf(1941, 3, 10) }, likely: dayOf(1941, 2, 22), label: '' },
    ]);
    expect(rows.map(({ lane, dates, note }) => [lane, dates, note])).toEqual([
      ['cipher in use', 'from 1 Jan 1928', '1928 on'],
      ['poured', '13 Jan 1941', 'share ½'],
      ['3C 1207 built', '10 Feb – 10 Mar 1941', 'most likely 22 Feb 1941'],
    ]);
    expect(new Set(rows.map(({ key }) => key)).size).toBe(3);
  });
});
