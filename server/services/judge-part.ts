import { judgeFit } from '#domain/fit/fit.ts';
import type { Fit, Lead } from '#domain/fit/fit.ts';
import { spanOnRecord } from './day-on-record.ts';
import { ProblemError } from './problem-error.ts';

type IsoSpan = { readonly from: string; readonly to: string };

export type FitOfPart = {
  readonly candidates: readonly (IsoSpan & { readonly share: number })[];
  readonly build: IsoSpan;
  /** Left out where no lead is sourced. */
  readonly lead?: Lead | undefined;
};

/**
 * Whether a part cast on these dates belongs on a machine built in this window.
 *
 * @throws ProblemError `invalid` where the question makes no sense though each of its values does.
 */
export function judgePart({ candidates, build, lead }: FitOfPart): Fit {
  const fit = judgeFit({
    candidates: candidates.map(({ from, to, share }) => ({ ...spanOnRecord({ from, to }), share })),
    build: spanOnRecord(build),
    lead,
  });
  if (fit.ok) return fit.value;
  const { code, candidate } = fit.fault;
  throw new ProblemError('invalid', 'See which, and why, under errors.', {
    errors: [{ path: candidate === undefined ? [] : ['candidates', candidate], message: `The question makes no sense: ${code}` }],
  });
}
