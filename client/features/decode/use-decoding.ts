import { useQuery } from '@tanstack/react-query';
import type { z } from 'zod';
import type { CipherItem } from '#contract/ciphers.ts';
import type { DecodeAnswer, DecodeRequest, DecodeResult } from '#contract/decode.ts';
import type { MakerItem } from '#contract/makers.ts';
import { parseReading } from '#domain/marks/reading.ts';
import { ciphersToChoose, decoding, makersToChoose } from './decode-queries.ts';
import { limitsOf } from './decode-state.ts';
import type { DecodeState } from './decode-state.ts';

export type Decoded = {
  readonly answer: DecodeAnswer | null;
  /** The result everything below speaks of: the only cipher asked about, or the only one that can make the mark; null while several stand. */
  readonly inHand: DecodeResult | null;
  /** The answer is that of the question before; a new one is on its way, or the mark is not whole. */
  readonly stale: boolean;
  readonly error: unknown;
  readonly again: () => void;
};

/** Asks what the mark in the address means, under what has been chosen. */
export function useDecoding(state: DecodeState): Decoded {
  const makers = useQuery(makersToChoose());
  const ciphers = useQuery(ciphersToChoose(state.maker));
  const request = requestOf(state, makers.data ?? null, ciphers.data ?? null);
  const reading = useQuery(decoding(request));
  const asked = state.mark !== '';
  const error = asked ? ((state.maker === null ? null : (makers.error ?? ciphers.error)) ?? reading.error) : null;
  const answer = asked && error === null ? (reading.data ?? null) : null;
  return {
    answer,
    inHand: answer === null ? null : resultInHand(answer),
    stale: answer !== null && (reading.isPlaceholderData || request === null),
    error,
    again: () => {
      for (const query of [makers, ciphers, reading]) if (query.isError) void query.refetch();
    },
  };
}

/** The question as the register takes it; null while the mark is not whole or what was chosen is not yet known by its id. */
export function requestOf(
  state: DecodeState,
  makers: readonly MakerItem[] | null,
  ciphers: readonly CipherItem[] | null,
): z.input<typeof DecodeRequest> | null {
  if (!parseReading(state.mark).ok) return null;
  const limits = limitsOf(state);
  const common = { mark: state.mark, lookAlikes: state.lookAlikes, ...(limits === undefined ? {} : { limits }) };
  if (state.maker === null) return common;
  if (state.cipher !== null) {
    const cipher = ciphers?.find(({ slug }) => slug === state.cipher);
    return cipher === undefined ? null : { ...common, cipherId: cipher.id };
  }
  const maker = makers?.find(({ slug }) => slug === state.maker);
  return maker === undefined ? null : { ...common, makerId: maker.id };
}

/** The result an answer is about: its only one, or the only one that can make the mark. */
export function resultInHand({ results }: DecodeAnswer): DecodeResult | null {
  const [first, ...others] = results;
  if (first === undefined || others.length === 0) return first ?? null;
  const able = results.filter(({ candidates }) => candidates.length > 0);
  return able.length === 1 ? (able[0] ?? null) : null;
}
