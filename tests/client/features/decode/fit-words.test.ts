// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { fitWords } from '#client/features/decode/fit-words.ts';
import { FitAnswer } from '#contract/fit.ts';
import type { CandidateVerdict, FitVerdict } from '#domain/fit/fit.ts';

type Heard = { readonly from: string; readonly verdict: CandidateVerdict; readonly leadDays: readonly [number, number]; readonly counts?: boolean };

function fit(verdict: FitVerdict, heard: readonly Heard[]): FitAnswer {
  const verdicts = [...new Set(heard.map((one) => one.verdict))];
  return FitAnswer.parse({
    late: 0,
    in: 1,
    early: 0,
    verdict,
    leadOnRecord: true,
    lead: { least: 0, most: 365 },
    candidates: heard.map(({ from, verdict: own, leadDays: [least, most], counts = true }) => ({
      from,
      to: from,
      share: 1 / heard.length,
      late: 0,
      in: 1,
      early: 0,
      verdict: own,
      leadDays: { least, most },
      counts,
    })),
    wouldSettle: verdict === 'unsettled' ? verdicts.map((own) => ({ verdict: own, share: 0.5, candidates: heard.flatMap((one, place) => (one.verdict === own ? [place] : [])) })) : [],
  });
}

describe('fitWords', () => {
  it('says which candidate would make it what', () => {
    const unsettled = fit('unsettled', [
      { from: '1941-01-13', verdict: 'in-step', leadDays: [28, 56] },
      { from: '1941-11-03', verdict: 'cast-after-build', leadDays: [-266, -238] },
    ]);
    expect(fitWords(unsettled)).toBe('In step if 13 Jan 1941 and cast after build if 3 Nov 1941.');
  });
  it('names two and counts the rest where many say the same', () => {
    const early = ['1931-01-13', '1932-01-13', '1933-01-13', '1934-01-13'].map((from) => ({ from, verdict: 'older-stock' as const, leadDays: [1000, 4000] as const }));
    expect(fitWords(fit('unsettled', [...early, { from: '1941-01-13', verdict: 'in-step', leadDays: [28, 56] }]))).toContain('Older stock if 13 Jan 1931, 13 Jan 1932 or 2 others');
  });
  it.each([
    ['in-step', [28, 56], 'Poured 28–56 days before it was built.'],
    ['cast-after-build', [-266, -238], 'Poured 8–9 months after it was built.'],
    ['possible', [-20, 8], 'Poured between 8 days before and 20 days after it was built.'],
  ] as const)('says where the only date lies: %s', (verdict, leadDays, words) => {
    expect(fitWords(fit(verdict, [{ from: '1941-01-13', verdict, leadDays }]))).toBe(words);
  });
  it.each([
    ['in-step', 'Every date it can mean lies 28–90 days before it was built.'],
    ['older-stock', 'Every date it can mean is earlier than the accepted lead: 28–90 days before it was built.'],
    ['possible', 'It depends on the very day: 28–90 days before it was built.'],
  ] as const)('takes the ends over all dates: %s', (verdict, words) => {
    expect(fitWords(fit(verdict, [{ from: '1941-01-13', verdict, leadDays: [28, 56] }, { from: '1940-12-10', verdict, leadDays: [62, 90] }]))).toBe(words);
  });
  it('does not listen to candidates too unlikely to count', () => {
    expect(fitWords(fit('in-step', [{ from: '1941-01-13', verdict: 'in-step', leadDays: [28, 56] }, { from: '1931-01-13', verdict: 'older-stock', leadDays: [3680, 3710], counts: false }]))).toBe(
      'Poured 28–56 days before it was built.',
    );
  });
});
