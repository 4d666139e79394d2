// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { ruleOfDecode, sayBuild, sayRule } from '#client/features/decode/rule-of-decode.ts';
import { FitAnswer } from '#contract/fit.ts';
import { dayOf } from '#domain/dates/day.ts';
import { BBOCB, build } from './samples.ts';

const FIT = FitAnswer.parse({
  late: 0.5,
  in: 0.5,
  early: 0,
  verdict: 'unsettled',
  leadOnRecord: true,
  lead: { least: 0, most: 365 },
  candidates: [
    { from: '1941-01-13', to: '1941-01-13', share: 0.5, late: 0, in: 1, early: 0, verdict: 'in-step', leadDays: { least: 28, most: 56 }, counts: true },
    { from: '1941-11-03', to: '1941-11-03', share: 0.5, late: 1, in: 0, early: 0, verdict: 'cast-after-build', leadDays: { least: -266, most: -238 }, counts: true },
  ],
  wouldSettle: [],
});

describe('ruleOfDecode', () => {
  it('shows the mark alone where no machine is named', () => {
    const rule = ruleOfDecode({ result: BBOCB, casting: null, build: null, fit: null });
    expect(rule.lanes.map(({ name }) => name)).toEqual(['cipher in use', 'poured']);
    expect(rule.focus).toEqual([dayOf(1941, 1, 13), dayOf(1941, 11, 3)].map((day) => ({ from: day, to: day })));
    expect(sayRule(rule)).toBe('Time ruler: cipher in use, poured');
  });
  it('adds the accepted lead and the build, and colours each date by its verdict', () => {
    const { lanes, focus } = ruleOfDecode({ result: BBOCB, casting: null, build: build(), fit: FIT });
    expect(lanes.map(({ name }) => name)).toEqual(['cipher in use', 'poured', 'accepted lead', '3C 1207 built']);
    expect(lanes[1]).toMatchObject({ kind: 'ticks', ticks: [{ tone: 'verdigris', note: 'share ½, in step' }, { tone: 'scale', note: 'share ½, cast after build' }] });
    expect(lanes[2]).toMatchObject({ bands: [{ from: dayOf(1941, 2, 10) - 365, to: dayOf(1941, 3, 10) }] });
    expect(focus).toContainEqual({ from: dayOf(1941, 2, 10), to: dayOf(1941, 3, 10) });
  });
  it('lets an open lead run off the rule', () => {
    const open = { ...FIT, leadOnRecord: false, lead: { least: 0, most: null } };
    const { lanes, focus } = ruleOfDecode({ result: BBOCB, casting: null, build: build(), fit: open });
    expect(lanes[2]).toMatchObject({ name: 'before the build', bands: [{ from: null }] });
    expect(Math.min(...focus.map(({ from }) => from))).toBe(dayOf(1941, 1, 13));
  });
  it('leaves a candidate too unlikely out of the zoom, and not off the rule', () => {
    const [january, november] = BBOCB.candidates;
    const result = { ...BBOCB, candidates: [{ ...january!, share: 0.995 }, { ...november!, from: '1951-11-03', to: '1951-11-03', share: 0.005 }] };
    const { lanes, focus } = ruleOfDecode({ result, casting: null, build: null, fit: null });
    expect(focus).toHaveLength(1);
    expect(lanes[1]).toMatchObject({ ticks: [{}, {}] });
  });
});

describe('sayBuild', () => {
  it('says the likely day only with its window', () => {
    expect(sayBuild(build())).toBe('10 Feb – 10 Mar 1941, most likely about 22 Feb 1941');
    expect(sayBuild(build({ likely: null }))).toBe('10 Feb – 10 Mar 1941');
    expect(sayBuild(build({ window: null, likely: null }))).toBeNull();
  });
});
