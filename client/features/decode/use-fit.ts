import { useQuery } from '@tanstack/react-query';
import type { z } from 'zod';
import type { DecodeResult } from '#contract/decode.ts';
import type { FitAnswer, FitRequest } from '#contract/fit.ts';
import type { BuildAnswer, ModelPage, Position } from '#contract/models.ts';
import { ProblemError } from '../../lib/problem-error.ts';
import { buildOf, fitOf, modelInHand } from './decode-queries.ts';
import type { DecodeState } from './decode-state.ts';

export type Held = {
  readonly model: ModelPage | null;
  readonly position: Position | null;
  readonly build: BuildAnswer | null;
  readonly fit: FitAnswer | null;
  readonly loading: boolean;
  readonly stale: boolean;
  /** What failed, of the three questions. */
  readonly error: unknown;
  readonly again: () => void;
};

/** Holds what the mark can mean against the machine in the address. */
export function useFit(state: DecodeState, inHand: DecodeResult | null): Held {
  const model = useQuery(modelInHand(state.model));
  const asked = state.model !== null && state.serial !== '';
  const build = useQuery(buildOf(state.model, state.serial));
  const position = model.data?.positions.find(({ slug }) => slug === state.position) ?? null;
  const ready = state.position === null || model.data !== undefined;
  const question = asked && ready ? fitQuestion(inHand, build.data ?? null, position) : null;
  const fit = useQuery(fitOf(question));
  const known = asked && !build.isError;
  return {
    model: model.data ?? null,
    position,
    build: known ? (build.data ?? null) : null,
    fit: question === null || fit.isError ? null : (fit.data ?? null),
    loading: asked && (build.isLoading || (question !== null && fit.isLoading)),
    stale: asked && (build.isPlaceholderData || (question !== null && fit.isPlaceholderData)),
    error: unlessMissing(state.model === null ? null : (model.error ?? (asked ? build.error : null))) ?? (question === null ? null : fit.error),
    again: () => {
      for (const query of [model, build, fit]) if (query.isError) void query.refetch();
    },
  };
}

/** A model that is not on record is told beside its field. */
function unlessMissing(error: Error | null): Error | null {
  return error instanceof ProblemError && error.kind === 'not-found' ? null : error;
}

/** The question of fit; null until there are dates and a build window to hold against each other. */
function fitQuestion(result: DecodeResult | null, build: BuildAnswer | null, position: Position | null): z.input<typeof FitRequest> | null {
  const window = build?.window ?? null;
  if (result === null || window === null || result.candidates.length === 0) return null;
  return {
    candidates: result.candidates.map(({ from, to, share }) => ({ from, to, share })),
    build: window,
    ...(position === null || position.lead === null ? {} : { lead: position.lead }),
  };
}
