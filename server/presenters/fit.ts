import type { FitAnswer } from '#contract/fit.ts';
import { writeDay } from '#domain/dates/day.ts';
import type { CandidateFit, Fit } from '#domain/fit/fit.ts';

export function presentFit(fit: Fit): FitAnswer {
  return {
    late: fit.late,
    in: fit.in,
    early: fit.early,
    verdict: fit.verdict,
    leadOnRecord: fit.leadOnRecord,
    lead: { least: fit.lead.least, most: fit.lead.most },
    candidates: fit.candidates.map(presentCandidateFit),
    wouldSettle: fit.wouldSettle.map(({ verdict, share, candidates }) => ({ verdict, share, candidates: [...candidates] })),
  };
}

function presentCandidateFit(candidate: CandidateFit): FitAnswer['candidates'][number] {
  return {
    from: writeDay(candidate.from),
    to: writeDay(candidate.to),
    share: candidate.share,
    late: candidate.late,
    in: candidate.in,
    early: candidate.early,
    verdict: candidate.verdict,
    leadDays: { least: candidate.leadLeast, most: candidate.leadMost },
    counts: candidate.counts,
  };
}
