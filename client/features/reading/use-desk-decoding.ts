import { useQuery } from '@tanstack/react-query';
import type { z } from 'zod';
import type { DecodeRequest } from '#contract/decode.ts';
import type { ReadingDesk } from '#contract/marks.ts';
import { parseReading } from '#domain/marks/reading.ts';
import { decoding } from '../decode/decode-queries.ts';
import { resultInHand } from '../decode/use-decoding.ts';
import type { Decoded } from '../decode/use-decoding.ts';

type Narrowing = NonNullable<ReadingDesk['narrowing']>;

/** The question a mark on the desk puts to the decoder; null while it is not whole, and for a reader who is to read without its answer. */
export function questionOf(text: string, narrowing: Narrowing | null): z.input<typeof DecodeRequest> | null {
  if (narrowing === null || !parseReading(text).ok) return null;
  const { makerId, from, to } = narrowing;
  const limits = { ...(from === null ? {} : { from }), ...(to === null ? {} : { to }) };
  return { mark: text, ...(makerId === null ? {} : { makerId }), ...(from === null && to === null ? {} : { limits }) };
}

/** Asks what a mark can mean, narrowed by what is known of its part. */
export function useDeskDecoding(text: string, narrowing: Narrowing | null): Decoded {
  const question = questionOf(text, narrowing);
  const { data, error, isError, isPlaceholderData, refetch } = useQuery(decoding(question));
  const asked = narrowing !== null && text !== '';
  const answer = asked && !isError ? (data ?? null) : null;
  return {
    answer,
    inHand: answer === null ? null : resultInHand(answer),
    stale: answer !== null && (isPlaceholderData || question === null),
    error: asked ? error : null,
    again: () => void refetch(),
  };
}
