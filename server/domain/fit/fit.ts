import { daysIn } from '../dates/day-span.ts';
import type { Day, DaySpan } from '../dates/day.ts';
import { fail, succeed, type Result } from '../result.ts';

/**
 * Fit of one part: could this part have been cast in time for this machine?
 *
 * C is the casting day (the decoder's candidates with their shares, the days of one candidate equally likely), B the build day
 * (the days of the build window equally likely), L = B − C the lead in whole days. Against the accepted lead [least, most], both
 * included: late = P(L < least), in = P(least ≤ L ≤ most), early = P(L > most).
 *
 * A candidate's verdict goes by its bounds, not by its chances. Lmin and Lmax are the least and the greatest lead over all its
 * days and all build days:
 *
 * | verdict          | when                          |
 * | ---------------- | ----------------------------- |
 * | in step          | least ≤ Lmin and Lmax ≤ most  |
 * | cast after build | Lmax < least                  |
 * | older stock      | Lmin > most                   |
 * | possible         | otherwise                     |
 *
 * Spans of days have no holes, so every lead between Lmin and Lmax happens and `possible` always has in > 0.
 *
 * The part's verdict is the one its candidates agree on; in step and possible together make possible; anything else is unsettled.
 * A position without a sourced lead is judged with least 0 and most open, so older stock is never said of it.
 */

export const FIT_VERDICTS = ['in-step', 'possible', 'older-stock', 'cast-after-build', 'unsettled'] as const;
export type FitVerdict = (typeof FIT_VERDICTS)[number];

/** What one candidate can be; only several of them together can be unsettled. */
export type CandidateVerdict = Exclude<FitVerdict, 'unsettled'>;

/** The accepted lead in days, both ends included; `most: null` = no upper end. */
export type Lead = { readonly least: number; readonly most: number | null };

/** Used where no lead is sourced: cast on the day of building at the latest, at any time before. */
const LEAD_WHERE_NONE_IS_SOURCED: Lead = { least: 0, most: null };

/** Candidates with a smaller share than this have no say in the verdict; they stay in the three figures. */
const LEAST_SHARE_WITH_A_SAY = 0.01;

/** A share of a hundredth made by dividing may fall short of it by rounding. */
const SHARE_ROUNDING = 1e-9;

/** A casting date or span with its part of the probability. Shares need not sum to 1. */
export type CastingCandidate = DaySpan & { readonly share: number };

export type FitQuestion = {
  readonly candidates: readonly CastingCandidate[];
  /** The build window. */
  readonly build: DaySpan;
  /** The position's accepted lead; left out where none is sourced. */
  readonly lead?: Lead | undefined;
};

export type FitFigures = { readonly late: number; readonly in: number; readonly early: number };

export type CandidateFit = DaySpan &
  FitFigures & {
    /** Its part of the probability among the candidates asked about; these sum to 1. */
    readonly share: number;
    readonly leadLeast: number;
    readonly leadMost: number;
    readonly verdict: CandidateVerdict;
    /** Whether its share is large enough for a say in the part's verdict. */
    readonly counts: boolean;
  };

/** What the verdict would be if the part's date turned out to be one of these candidates (places in `candidates`). */
export type Settlement = { readonly verdict: CandidateVerdict; readonly share: number; readonly candidates: readonly number[] };

export type Fit = FitFigures & {
  readonly verdict: FitVerdict;
  readonly leadOnRecord: boolean;
  readonly lead: Lead;
  /** In the order they were asked about. */
  readonly candidates: readonly CandidateFit[];
  /** One entry a verdict, in the order of `FIT_VERDICTS`; empty unless the part is unsettled. */
  readonly wouldSettle: readonly Settlement[];
};

export const FIT_FAULTS = [
  'no-candidates',
  'candidate-reversed',
  'share-not-a-proportion',
  'no-share',
  'build-reversed',
  'lead-negative',
  'lead-reversed',
  'not-whole-days',
] as const;
export type FitFault = {
  readonly code: (typeof FIT_FAULTS)[number];
  /** Which candidate, counted from 0, where the fault is a candidate's. */
  readonly candidate?: number;
};

/**
 * Judges one part for one machine. Sums are exact over whole days and in closed form: the cost is that of the number of
 * candidates, not of their length. Where no candidate reaches a hundredth (a mark that can mean hundreds of days),
 * all of them have a say.
 *
 * @example judgeFit({ candidates: [{ from: 0, to: 0, share: 1 }], build: { from: 10, to: 20 } })  //=> in step, lead 10 to 20
 */
export function judgeFit(question: FitQuestion): Result<Fit, FitFault> {
  const { build } = question;
  const lead = question.lead ?? LEAD_WHERE_NONE_IS_SOURCED;
  const fault = faultOf(question.candidates, build, lead);
  if (fault !== null) return fail(fault);

  const total = sum(question.candidates.map((candidate) => candidate.share));
  const shares = question.candidates.map((candidate) => candidate.share / total);
  const noneCounts = shares.every((share) => !hasASay(share));
  const candidates = question.candidates.map((candidate, place): CandidateFit => {
    const share = shares[place] ?? 0;
    const leadLeast = build.from - candidate.to;
    const leadMost = build.to - candidate.from;
    return {
      from: candidate.from,
      to: candidate.to,
      share,
      ...figuresOf(candidate, build, lead),
      leadLeast,
      leadMost,
      verdict: verdictByBounds(leadLeast, leadMost, lead),
      counts: noneCounts || hasASay(share),
    };
  });
  const verdict = commonVerdict(candidates.filter((candidate) => candidate.counts).map((candidate) => candidate.verdict));
  return succeed({
    late: sum(candidates.map((candidate) => candidate.share * candidate.late)),
    in: sum(candidates.map((candidate) => candidate.share * candidate.in)),
    early: sum(candidates.map((candidate) => candidate.share * candidate.early)),
    verdict,
    leadOnRecord: question.lead !== undefined,
    lead,
    candidates,
    wouldSettle: verdict === 'unsettled' ? settlementsOf(candidates) : [],
  });
}

function faultOf(candidates: readonly CastingCandidate[], build: DaySpan, lead: Lead): FitFault | null {
  if (!isWhole(build.from) || !isWhole(build.to)) return { code: 'not-whole-days' };
  if (build.from > build.to) return { code: 'build-reversed' };
  if (!isWhole(lead.least) || (lead.most !== null && !isWhole(lead.most))) return { code: 'not-whole-days' };
  if (lead.least < 0) return { code: 'lead-negative' };
  if (lead.most !== null && lead.most < lead.least) return { code: 'lead-reversed' };
  if (candidates.length === 0) return { code: 'no-candidates' };
  for (const [place, candidate] of candidates.entries()) {
    if (!isWhole(candidate.from) || !isWhole(candidate.to)) return { code: 'not-whole-days', candidate: place };
    if (candidate.from > candidate.to) return { code: 'candidate-reversed', candidate: place };
    if (!(candidate.share >= 0 && candidate.share <= 1)) return { code: 'share-not-a-proportion', candidate: place };
  }
  return candidates.every((candidate) => candidate.share === 0) ? { code: 'no-share' } : null;
}

function figuresOf(cast: DaySpan, build: DaySpan, lead: Lead): FitFigures {
  const pairs = daysIn(cast) * daysIn(build);
  const late = pairsWithLeadUpTo(lead.least - 1, cast, build);
  const notEarly = pairsWithLeadUpTo(lead.most ?? Infinity, cast, build);
  return { late: late / pairs, in: (notEarly - late) / pairs, early: (pairs - notEarly) / pairs };
}

/**
 * How many pairs of a casting day and a build day have a lead of at most `most` days. For the i-th casting day that is the number
 * of build days up to it plus `most`, held between 0 and the window's length; the sum of such a ramp is a difference of
 * triangular numbers, exact in a double as long as the two spans together are shorter than 90 million days.
 */
function pairsWithLeadUpTo(most: number, cast: DaySpan, build: DaySpan): number {
  if (most < build.from - cast.to) return 0;
  if (most >= build.to - cast.from) return daysIn(cast) * daysIn(build);
  const beforeFirst = cast.from + most - build.from;
  const atLast = cast.to + most - build.from + 1;
  const windowLength = daysIn(build);
  return (
    triangular(atLast) - triangular(beforeFirst) - (triangular(atLast - windowLength) - triangular(beforeFirst - windowLength))
  );
}

/** 1 + 2 + … + n, and 0 for n below 1. */
function triangular(n: number): number {
  return n > 0 ? (n * (n + 1)) / 2 : 0;
}

function verdictByBounds(leadLeast: number, leadMost: number, lead: Lead): CandidateVerdict {
  const most = lead.most ?? Infinity;
  if (lead.least <= leadLeast && leadMost <= most) return 'in-step';
  if (leadMost < lead.least) return 'cast-after-build';
  return leadLeast > most ? 'older-stock' : 'possible';
}

function commonVerdict(verdicts: readonly CandidateVerdict[]): FitVerdict {
  const [first, ...others] = [...new Set(verdicts)];
  if (first !== undefined && others.length === 0) return first;
  return verdicts.every((verdict) => verdict === 'in-step' || verdict === 'possible') ? 'possible' : 'unsettled';
}

function settlementsOf(candidates: readonly CandidateFit[]): readonly Settlement[] {
  return FIT_VERDICTS.filter((verdict) => verdict !== 'unsettled').flatMap((verdict) => {
    const places = [...candidates.keys()].filter((place) => candidates[place]?.counts && candidates[place].verdict === verdict);
    if (places.length === 0) return [];
    return [{ verdict, share: sum(places.map((place) => candidates[place]?.share ?? 0)), candidates: places }];
  });
}

function hasASay(share: number): boolean {
  return share >= LEAST_SHARE_WITH_A_SAY - SHARE_ROUNDING;
}

function isWhole(day: Day): boolean {
  return Number.isSafeInteger(day);
}

function sum(numbers: readonly number[]): number {
  return numbers.reduce((total, number) => total + number, 0);
}
